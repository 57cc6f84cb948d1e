const sunk: Record<string, string> = {
  ...{ ₐ: 'a', ₑ: 'e', ₕ: 'h', ᵢ: 'i', ⱼ: 'j', ₖ: 'k', ₗ: 'l', ₘ: 'm', ₙ: 'n', ₒ: 'o', ₚ: 'p', ᵣ: 'r', ₛ: 's' },
  ...{ ₜ: 't', ᵤ: 'u', ᵥ: 'v', ₓ: 'x', '₀': '0', '₁': '1', '₂': '2', '₃': '3', '₄': '4', '₅': '5', '₆': '6' },
}

interface Part {
  text: string
  low: boolean
}

/** "Tₐ" as T and a low a: the letters of the text's own face instead of those that Unicode has small. */
export function partsOf(symbol: string): Part[] {
  const parts: Part[] = []
  for (const letter of symbol) {
    const low = Object.hasOwn(sunk, letter)
    const text = low ? sunk[letter]! : letter
    const last = parts.at(-1)
    if (last?.low === low) last.text += text
    else parts.push({ text, low })
  }
  return parts
}
