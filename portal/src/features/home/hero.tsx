import type { UseQueryResult } from '@tanstack/react-query'
import { useState } from 'react'
import { CodeBlock } from '../../components/code-block.tsx'
import { JsonCode } from '../../components/json-code.tsx'
import { jsonText } from '../../components/json-text.ts'
import { Note } from '../../components/note.tsx'
import { AnswerBlocks } from './answer-blocks.tsx'
import { QueryView } from '../../components/query-view.tsx'
import { Slider } from '../../components/slider.tsx'
import { FieldFigure } from '../../figure/field-figure.tsx'
import type { Field } from '../../figure/field.ts'
import { nearest } from '../../figure/grid.ts'
import { plain } from '../../figure/measures.ts'
import { type Answer, type CompactAnswer, isFull } from '../../solving/solve.ts'
import { CASE, END_HOURS, wallBody } from './wall.ts'

interface Props {
  field: UseQueryResult<Field>
  answer: UseQueryResult<Answer | CompactAnswer>
  film: number
  hours: number
  position: number
  /** Film coefficient and hours of what is shown. */
  asked: readonly [number, number]
  onPosition(position: number): void
  onHours(hours: number): void
}

/** A brick wall meets the cold: the figure, and the call and answer behind it. */
export function Hero({ field, answer, film, hours, position, asked, onPosition, onHours }: Props) {
  const [depth, setDepth] = useState(0.12)
  const request = `POST /v1/cases/${CASE}/solve\n${jsonText(wallBody(...asked))}`
  return (
    <div className="hero">
      <div className="drawing-cell min-w-0">
        <h2>A brick wall meets the cold</h2>
        <p className="prose mt-1 mb-5">
          360 mm of solid brick at 20 °C, insulated on the room side. At hour 0 the air outside drops to {'\u2212'}10
          °C. Every line below is solved by the service as you move the sliders.
        </p>
        <QueryView query={field} what="Solving the wall.">
          {(solved) => (
            <FieldFigure
              field={solved}
              cut={{ row: nearest(solved.times, hours * 3600), column: nearest(solved.places, depth) }}
              onCut={({ row, column }) => {
                onHours(Math.max(0.5, Math.round((solved.times[row]! / 3600) * 2) / 2))
                setDepth(solved.places[column]!)
              }}
              hatch="masonry"
              material="brick"
              history={false}
            />
          )}
        </QueryView>
        <p className="prose mt-3">
          The plan cut at A{'\u2060'}–{'\u2060'}A is the profile above it.
        </p>
      </div>
      <div className="side">
        <div className="grid gap-3 sliders">
          <Slider
            label={
              <>
                Film coefficient, <i>h</i>
              </>
            }
            shown={`${film.toPrecision(3)} W/(m²·K)`}
            min={0}
            max={100}
            value={position}
            onChange={onPosition}
            hint="2 still air · 7.7 inside · 25 outside · 100 strong wind"
          />
          <Slider
            label={
              <>
                Time after the change, <i>t</i>
              </>
            }
            shown={`${plain(hours)} h`}
            min={0.5}
            max={END_HOURS}
            step={0.5}
            value={hours}
            onChange={onHours}
          />
        </div>
        <CodeBlock caption="Request" text={jsonText(wallBody(...asked))} label="Request">
          <JsonCode text={request} />
        </CodeBlock>
        <QueryView query={answer} what="Solving at four depths.">
          {(shown) => <AnswerBlocks answer={shown} older={answer.isPlaceholderData} />}
        </QueryView>
      </div>
      {answer.data && isFull(answer.data) && <Cautions cautions={answer.data.cautions} />}
    </div>
  )
}

/** Beside the figure, so that nobody reads the one without the other. */
function Cautions({ cautions }: { cautions: Answer['cautions'] }) {
  return (
    <div className="cautions grid gap-3">
      {cautions.map(({ id, text }) => (
        <Note key={id} kind="caution">
          {text}
        </Note>
      ))}
    </div>
  )
}
