import { scaleLinear, scaleLog } from 'd3-scale'
import { line } from 'd3-shape'

export interface Series {
  label: string
  x: number[]
  y: number[]
}

export interface Drawing {
  title: string
  /** What is drawn and what it errs by, in a sentence or two: read aloud, and printed below. */
  description: string
  x: { label: string; log: boolean }
  y: { label: string; log: boolean }
  width: number
  height: number
  series: readonly Series[]
}

const margin = { top: 48, right: 112, bottom: 92, left: 72 }
/** Told apart by the dash as much as by the colour. */
const strokes = ['#1c2321', '#a3341f', '#1f5a7a', '#6b5a00', '#5c2f6e', '#2c6a3c', '#7a4a2a', '#46505a']
const dashes = ['', '7 3', '2 3', '10 3 2 3', '5 2', '1 4', '12 4', '4 4 1 4']
const LINE_HEIGHT = 14

/** A plot of curves as an SVG document, the same for the same numbers. */
export function drawingOf(d: Drawing): string {
  const inner = { width: d.width - margin.left - margin.right, height: d.height - margin.top - margin.bottom }
  const x = scaleOf(
    d.x.log,
    d.series.flatMap((s) => s.x),
    [0, inner.width],
    false,
  )
  const y = scaleOf(
    d.y.log,
    d.series.flatMap((s) => s.y),
    [inner.height, 0],
    true,
  )
  const id = `chart-${d.series.length}-${d.width}x${d.height}`
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${d.width}" height="${d.height}" viewBox="0 0 ${d.width} ${d.height}" role="img" aria-labelledby="${id}-title ${id}-desc" font-family="sans-serif" font-size="12" fill="#1c2321">`,
    `<title id="${id}-title">${escaped(d.title)}</title>`,
    `<desc id="${id}-desc">${escaped(d.description)}</desc>`,
    `<rect width="${d.width}" height="${d.height}" fill="#ffffff"/>`,
    `<text x="${margin.left}" y="26" font-size="16" font-weight="bold">${escaped(d.title)}</text>`,
    `<g transform="translate(${margin.left} ${margin.top})">`,
    ...axisX(x, inner, d.x.label),
    ...axisY(y, inner, d.y.label),
    ...curves(d.series, x, y, inner.width),
    `</g>`,
    ...wrapped(d.description, Math.floor((d.width - 32) / 5.6)).map(
      (text, i) => `<text x="16" y="${d.height - 34 + i * LINE_HEIGHT}" font-size="11">${escaped(text)}</text>`,
    ),
    `</svg>`,
  ].join('\n')
}

type Scale = ReturnType<typeof scaleOf>

function scaleOf(log: boolean, values: readonly number[], range: [number, number], nice: boolean) {
  const known = log ? values.filter((v) => v > 0) : values
  const low = known.reduce((m, v) => Math.min(m, v), Infinity)
  const high = known.reduce((m, v) => Math.max(m, v), -Infinity)
  // A constant has no range to spread over the axis; one about it is shown.
  const flat = !(high > low)
  const pad = flat ? Math.abs(high) * 0.1 || 1 : 0
  const domain: [number, number] = log ? [flat ? low / 2 : low, flat ? high * 2 : high] : [low - pad, high + pad]
  const scale = (log ? scaleLog() : scaleLinear()).domain(domain).range(range)
  return nice ? scale.nice() : scale
}

const hundredth = (value: number) => Math.round(value * 100) / 100
const at = (value: number) => String(Math.round(value * 10) / 10)

function ticksOf(scale: Scale, count: number): { at: number; text: string }[] {
  const format = scale.tickFormat(count)
  return scale.ticks(count).map((value) => ({ at: scale(value), text: format(value) }))
}

function axisX(scale: Scale, { width, height }: { width: number; height: number }, label: string): string[] {
  return [
    ...ticksOf(scale, Math.max(2, Math.floor(width / 80))).flatMap((tick) => [
      `<line x1="${at(tick.at)}" x2="${at(tick.at)}" y1="0" y2="${height}" stroke="#d9d6cc"/>`,
      `<text x="${at(tick.at)}" y="${height + 18}" text-anchor="middle">${escaped(tick.text)}</text>`,
    ]),
    `<line x1="0" x2="${width}" y1="${height}" y2="${height}" stroke="#1c2321"/>`,
    `<text x="${at(width / 2)}" y="${height + 38}" text-anchor="middle">${escaped(label)}</text>`,
  ]
}

function axisY(scale: Scale, { width, height }: { width: number; height: number }, label: string): string[] {
  return [
    ...ticksOf(scale, Math.max(2, Math.floor(height / 50))).flatMap((tick) => [
      `<line x1="0" x2="${width}" y1="${at(tick.at)}" y2="${at(tick.at)}" stroke="#d9d6cc"/>`,
      `<text x="-8" y="${at(tick.at + 4)}" text-anchor="end">${escaped(tick.text)}</text>`,
    ]),
    `<line x1="0" x2="0" y1="0" y2="${height}" stroke="#1c2321"/>`,
    `<text transform="translate(-54 ${at(height / 2)}) rotate(-90)" text-anchor="middle">${escaped(label)}</text>`,
  ]
}

/** The curves with their names at their ends, moved apart where they would overlap. */
function curves(series: readonly Series[], x: Scale, y: Scale, width: number): string[] {
  const path = line<[number, number]>()
  const drawn = series.map((s, i) => {
    const points = s.x
      .map((v, k): [number, number] => [hundredth(x(v)), hundredth(y(s.y[k]!))])
      .filter((p) => p.every(Number.isFinite))
    return {
      label: s.label,
      path: path(points) ?? '',
      end: points.at(-1)?.[1] ?? 0,
      stroke: strokes[i % strokes.length]!,
      dash: dashes[i % dashes.length]!,
    }
  })
  const places = apart(drawn.map(({ end }) => end))
  return drawn.flatMap(({ label, path, stroke, dash }, i) => [
    `<path d="${path}" fill="none" stroke="${stroke}" stroke-width="2"${dash ? ` stroke-dasharray="${dash}"` : ''}/>`,
    `<text x="${width + 8}" y="${at(places[i]! + 4)}" fill="${stroke}">${escaped(label)}</text>`,
  ])
}

function apart(ends: readonly number[]): number[] {
  const order = ends.map((_, i) => i).sort((a, b) => ends[a]! - ends[b]!)
  const places = [...ends]
  order.forEach((i, k) => {
    const above = order[k - 1]
    if (above !== undefined) places[i] = Math.max(places[i]!, places[above]! + LINE_HEIGHT)
  })
  return places
}

/** Words in lines of so many characters, three at most. */
function wrapped(text: string, length: number): string[] {
  const lines: string[] = ['']
  for (const word of text.split(' ')) {
    const last = lines.at(-1)!
    if (last && last.length + word.length >= length) lines.push(word)
    else lines[lines.length - 1] = last ? `${last} ${word}` : word
  }
  return lines.slice(0, 3)
}

const entities: Record<string, string> = { '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' }

/** Text for XML, which has no place for most control characters. */
function escaped(text: string): string {
  return text.replace(/[\u0000-\u001f\u007f\ufffe\uffff]/g, ' ').replace(/[&<>"]/g, (c) => entities[c]!)
}
