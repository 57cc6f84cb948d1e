/* A drawing that stands by itself: with the colours and type it has on the sheet, and the hatches it refers to. */

const SVG = 'http://www.w3.org/2000/svg'

/** Attributes that the sheet sets by its styles, with what holds where they are not given. */
const painted: Readonly<Record<string, string>> = {
  fill: 'rgb(0, 0, 0)',
  stroke: 'none',
  'stroke-width': '1px',
  'stroke-dasharray': 'none',
  'stroke-linejoin': 'miter',
  'paint-order': 'normal',
  opacity: '1',
}
const lettered: Readonly<Record<string, string>> = {
  'font-family': '',
  'font-size': '',
  'font-weight': '400',
  'font-style': 'normal',
  'text-anchor': 'start',
}
const none: Readonly<Record<string, string>> = { opacity: '1' }

const attributesOf = ({ localName }: Element) => {
  if (localName === 'text' || localName === 'tspan') return { ...painted, ...lettered }
  return ['g', 'svg', 'pattern'].includes(localName) ? none : painted
}

/** Pixels of a picture for each of the drawing. */
const SCALE = 2
const MARGIN = 16

/** The drawings of a part of the sheet, one below the other, as the text of one SVG. */
export function svgOf(part: Element): string {
  const drawings = [...part.querySelectorAll<SVGSVGElement>('svg.drawing')]
  const sizes = drawings.map((one) => [one.width.baseVal.value, one.height.baseVal.value] as const)
  const width = Math.max(...sizes.map(([w]) => w)) + 2 * MARGIN
  const height = sizes.reduce((sum, [, h]) => sum + h, 0) + 2 * MARGIN
  const defs = made('defs', {})
  const whole = made('svg', { width, height, viewBox: `${-MARGIN} ${-MARGIN} ${width} ${height}` })
  const fill = getComputedStyle(document.body).backgroundColor
  whole.append(titleOf(drawings), defs, made('rect', { x: -MARGIN, y: -MARGIN, width, height, fill }))
  let y = 0
  for (const [i, drawing] of drawings.entries()) {
    const copy = inlined(drawing)
    setAll(copy, { y, overflow: 'visible' })
    whole.append(copy)
    y += sizes[i]?.[1] ?? 0
  }
  for (const id of referredIn(whole)) {
    const hatch = document.getElementById(id)
    if (hatch) defs.append(inlined(hatch))
  }
  return new XMLSerializer().serializeToString(whole)
}

/** The same as a picture, drawn by the browser. */
export async function pngOf(part: Element): Promise<Blob> {
  const image = new Image()
  image.src = `data:image/svg+xml,${encodeURIComponent(svgOf(part))}`
  await image.decode()
  const canvas = document.createElement('canvas')
  canvas.width = image.width * SCALE
  canvas.height = image.height * SCALE
  canvas.getContext('2d')?.drawImage(image, 0, 0, canvas.width, canvas.height)
  return new Promise((resolve, reject) =>
    canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error('the browser made no picture'))), 'image/png'),
  )
}

function titleOf(drawings: readonly Element[]): Element {
  const title = made('title', {})
  title.textContent = drawings
    .map((one) => one.getAttribute('aria-label'))
    .filter(Boolean)
    .join(' ')
  return title
}

/** A copy that needs no style sheet. */
function inlined<E extends Element>(element: E): E {
  const copy = element.cloneNode(true) as E
  const copies = [copy, ...copy.querySelectorAll('*')]
  for (const [i, one] of [element, ...element.querySelectorAll('*')].entries()) {
    const style = getComputedStyle(one)
    const own = copies[i]
    if (!own) continue
    own.removeAttribute('class')
    for (const [name, usual] of Object.entries(attributesOf(one))) {
      const value = style.getPropertyValue(name)
      if (value !== usual || own.hasAttribute(name)) own.setAttribute(name, value)
    }
  }
  return copy
}

/** The ids that fills refer to; an address of the page before one is taken away. */
function referredIn(whole: Element): Set<string> {
  const ids = new Set<string>()
  for (const one of whole.querySelectorAll('[fill^="url("]')) {
    const id = /#([^")]+)/.exec(one.getAttribute('fill') ?? '')?.[1]
    if (!id) continue
    ids.add(id)
    one.setAttribute('fill', `url(#${id})`)
  }
  return ids
}

function made(name: string, attributes: Readonly<Record<string, string | number>>): Element {
  const element = document.createElementNS(SVG, name)
  setAll(element, attributes)
  return element
}

function setAll(element: Element, attributes: Readonly<Record<string, string | number>>): void {
  for (const [name, value] of Object.entries(attributes)) element.setAttribute(name, String(value))
}
