import { whole } from '../components/formats.ts'
import { Drawing } from '../figure/drawing.tsx'
import { useWidth } from '../figure/use-width.ts'
import type { RequestWhole } from './request-details.tsx'

interface Event {
  /** Milliseconds after the call was received. */
  after: number
  name: string
  detail: string
  refused?: boolean
}

/** The call as a chain of dimensions: received, entered in the ledger, answered. */
export function CallChain({ request }: { request: RequestWhole }) {
  const [box, width] = useWidth<HTMLDivElement>()
  const events = eventsOf(request)
  return (
    <div ref={box} className="min-w-0 mt-3">
      {width > 0 && (width < 560 ? <Upright width={width} events={events} /> : <Level width={width} events={events} />)}
    </div>
  )
}

function eventsOf({ at, milliseconds, bytesIn, bytesOut, status, points, ledger, problem }: RequestWhole): Event[] {
  const start = Date.parse(at)
  const entries = ledger.map((entry) => ({
    after: Math.min(milliseconds, Math.max(0, Date.parse(entry.at) - start)),
    name: entry.kind,
    detail: `${whole(entry.points)} points`,
  }))
  return [
    { after: 0, name: 'received', detail: `${whole(bytesIn)} bytes` },
    ...entries,
    {
      after: milliseconds,
      name: status === 499 ? 'client hung up' : `${status} sent`,
      detail: problem ? `${whole(points)} points charged` : `${whole(bytesOut)} bytes`,
      refused: status >= 400,
    },
  ]
}

const ms = (value: number) => `${value.toFixed(1)} ms`
const sentence = (events: readonly Event[]) =>
  events.map(({ after, name, detail }) => `${name} at ${ms(after)}, ${detail}`).join('; ')

/* Evenly spaced: the figures between the strokes carry the times, which may lie far apart. */
function Level({ width, events }: { width: number; events: readonly Event[] }) {
  const x = (i: number) => 2 + ((width - 180) * i) / (events.length - 1)
  const y = 50
  return (
    <Drawing width={width} height={112} label={`What happened: ${sentence(events)}`}>
      <line className="dim" x1={x(0)} x2={x(events.length - 1)} y1={y} y2={y} />
      {events.map(({ after, name, detail, refused }, i) => (
        <g key={i}>
          <line className="thin" x1={x(i)} x2={x(i)} y1={y - 24} y2={y + 16} />
          <line className={refused ? 'now' : 'dim'} x1={x(i) - 5} y1={y + 5} x2={x(i) + 5} y2={y - 5} />
          {refused && <circle className="now" cx={x(i)} cy={y} r={7} />}
          <text className={refused ? 't-clay' : 't-ink'} x={x(i) + 6} y={y + 34}>
            {name}
          </text>
          <text x={x(i) + 6} y={y + 52}>
            {detail}
          </text>
          <text className="t-ink" x={x(i) + 6} y={y - 28}>
            {ms(after)}
          </text>
          {i > 0 && (
            <text x={(x(i) + x(i - 1)) / 2} y={y - 7} textAnchor="middle">
              {ms(after - events[i - 1]!.after)}
            </text>
          )}
        </g>
      ))}
    </Drawing>
  )
}

function Upright({ width, events }: { width: number; events: readonly Event[] }) {
  const y = (i: number) => 14 + 52 * i
  return (
    <Drawing width={width} height={y(events.length - 1) + 40} label={`What happened: ${sentence(events)}`}>
      <line className="dim" x1={84} x2={84} y1={y(0)} y2={y(events.length - 1)} />
      {events.map(({ after, name, detail, refused }, i) => (
        <g key={i}>
          <line className={refused ? 'now' : 'dim'} x1={80} y1={y(i) + 4} x2={88} y2={y(i) - 4} />
          <text x={72} y={y(i) + 4} textAnchor="end">
            {ms(after)}
          </text>
          <text className={refused ? 't-clay' : 't-ink'} x={102} y={y(i) + 4}>
            {name}
          </text>
          <text x={102} y={y(i) + 21}>
            {detail}
          </text>
        </g>
      ))}
    </Drawing>
  )
}
