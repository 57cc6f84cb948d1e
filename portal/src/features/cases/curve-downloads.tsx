import { useMutation } from '@tanstack/react-query'
import type { RefObject } from 'react'
import { LinkButton } from '../../components/button.tsx'
import { download } from '../../components/download.ts'
import { csvOf } from '../../solving/curve-csv.ts'
import type { FieldDrawing } from '../../solving/field-drawing.ts'
import type { HistoryDrawing } from '../../solving/history-drawing.ts'

interface Props {
  drawing: FieldDrawing | HistoryDrawing
  /** Of the files. */
  name: string
  /** What is drawn; nothing where the table is shown. */
  drawn: RefObject<HTMLElement | null> | undefined
}

/** The curve as it is seen, and its numbers, as files. */
export function CurveDownloads({ drawing, name, drawn }: Props) {
  const saving = useMutation({
    mutationFn: async (kind: 'svg' | 'png') => {
      const part = drawn?.current
      if (!part) return
      const { pngOf, svgOf } = await import('../../figure/saved-drawing.ts')
      const content = kind === 'png' ? await pngOf(part) : new Blob([svgOf(part)], { type: 'image/svg+xml' })
      download(`${name}.${kind}`, content)
    },
  })
  return (
    <div className="btnrow mt-5" role="group" aria-label="Save the curve">
      {drawn && (
        <>
          <LinkButton onClick={() => saving.mutate('svg')}>Save as SVG</LinkButton>
          <LinkButton onClick={() => saving.mutate('png')}>Save as PNG</LinkButton>
        </>
      )}
      <LinkButton onClick={() => download(`${name}.csv`, new Blob([csvOf(drawing)], { type: 'text/csv' }))}>
        Save all numbers as CSV
      </LinkButton>
      {saving.isError && (
        <span role="alert" className="lab">
          The browser made no file of it. The CSV holds the same numbers.
        </span>
      )}
    </div>
  )
}
