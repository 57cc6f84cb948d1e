import { CodeBlock } from '../../components/code-block.tsx'
import { JsonCode } from '../../components/json-code.tsx'
import { jsonText } from '../../components/json-text.ts'
import { Note } from '../../components/note.tsx'
import { type Answer, type CompactAnswer, isFull } from '../../solving/solve.ts'

/** The numbers at once, the whole on demand; warnings are never folded. */
export function AnswerBlocks({ answer, older }: { answer: Answer | CompactAnswer; older: boolean }) {
  const whole = jsonText(answer)
  const excerpt = isFull(answer) ? jsonText(excerptOf(answer)) : whole
  return (
    <div className="min-w-0 grid gap-4">
      <CodeBlock
        caption={older ? 'Answer · older than the sliders' : 'Answer · 200 · excerpt'}
        text={whole}
        label="Answer, excerpt"
      >
        <JsonCode text={excerpt} />
      </CodeBlock>
      {isFull(answer) &&
        answer.warnings.map(({ code, text }) => (
          <Note key={code} kind="warning">
            {text}
          </Note>
        ))}
      <details className="more">
        <summary>The whole answer, with input, checks and sources</summary>
        <CodeBlock caption="Answer · 200" text={whole} label="Whole answer" tall>
          <JsonCode text={whole} />
        </CodeBlock>
      </details>
    </div>
  )
}

function excerptOf({ case: caseId, solver, points, result, numbers, accuracy: { method, terms, bound } }: Answer) {
  return { case: caseId, solver, points, result, accuracy: { method, terms, bound }, numbers }
}
