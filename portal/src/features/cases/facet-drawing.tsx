import type { ReactNode } from 'react'
import { Drawing } from '../../figure/drawing.tsx'
import { hatched } from '../../figure/hatches.tsx'
import { Sketch } from '../../figure/sketch/sketch.tsx'

/** The small drawing of a mark; nothing for a value that has none. */
export function FacetDrawing({ facet, value }: { facet: string; value: string }) {
  if (facet === 'body') return <Sketch sketch={{ body: value, boundary: '' }} />
  if (facet === 'boundary') return <Sketch sketch={{ body: bodyFor[value] ?? 'half-space', boundary: value }} />
  const drawn = questions[value]
  if (!drawn) return null
  return (
    <Drawing width={184} height={104}>
      <path className="thin" d="M14 12V92H176" />
      {drawn}
    </Drawing>
  )
}

/** The body on which a boundary is best seen. */
const bodyFor: Record<string, string> = { contact: 'two-bodies', 'two-sides': 'slab', source: 'slab', bath: 'slab' }

const falling = 'M14 24C46 26 62 70 108 78S158 84 174 85'

const questions: Record<string, ReactNode> = {
  'how-hot': (
    <>
      <path className="past" d={falling} />
      <path className="proj" d="M66 58V92M66 58H14" />
      <circle className="ring" cx={66} cy={58} r={6} />
    </>
  ),
  when: (
    <>
      <path className="past" d={falling} />
      <path className="dash" d="M14 66H80" />
      <path className="now" d="M80 66V88m-5-7l5 7l5-7" />
    </>
  ),
  'how-deep': (
    <>
      <rect fill={hatched('masonry')} opacity={0.6} x={14} y={12} width={160} height={80} />
      <path className="past" d="M14 86C42 44 82 30 174 27" />
      <path className="now" d="M14 80H50m-8-5l8 5l-8 5M54 48V88" />
    </>
  ),
  'how-much-heat': (
    <>
      <path className="w-clay" d="M14 92C46 48 96 34 174 30V92Z" />
      <path fill={hatched('upright')} d="M14 92C46 48 96 34 174 30V92Z" />
      <path className="now" d="M14 92C46 48 96 34 174 30" />
    </>
  ),
  extremes: (
    <>
      <path className="past" d="M14 62C40 8 66 8 88 52S140 96 174 54" />
      <path className="now" d="M34 24H68M104 78H150" />
    </>
  ),
  chart: (
    <>
      <path className="past" d="M14 24C62 25 92 40 174 44" />
      <path className="now" d="M14 24C48 26 72 62 174 66" />
      <path className="past" d="M14 24C30 28 52 80 174 84" />
    </>
  ),
}
