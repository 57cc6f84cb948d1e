import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useId, useState } from 'react'
import { Button } from '../../components/button.tsx'
import { CodeBlock } from '../../components/code-block.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { counted } from '../../components/formats.ts'
import { SendButton } from '../../components/send-button.tsx'
import { ImportRows } from './import-rows.tsx'
import { allLists, importMaterials } from './queries.ts'
import { labels, words } from './words.ts'

const sample = [Object.keys(labels).join(','), '"Lime render",plaster,0.72,1650,950,dry,"Own report 12",medium'].join(
  '\n',
)

/** A file is examined row by row first; then those rows are kept that will do. */
export function ImportMaterials({ onClose }: { onClose(): void }) {
  const id = useId()
  const client = useQueryClient()
  const [text, setText] = useState('')
  const examine = useMutation({
    mutationFn: async (file: File) => {
      const content = await file.text()
      setText(content)
      return importMaterials(content, true)
    },
  })
  const keep = useMutation({
    mutationFn: () => importMaterials(text, false),
    onSuccess: () => client.invalidateQueries(allLists),
  })
  const report = keep.data ?? examine.data
  return (
    <Dialog title="Import materials from CSV" onClose={onClose}>
      <div className="body grid gap-3">
        {keep.data ? (
          <p role="status" className="prose">
            <b>{counted(keep.data.accepted, 'material')} kept</b>
            {keep.data.refused > 0 && `, ${counted(keep.data.refused, 'row')} refused`}.
          </p>
        ) : (
          <>
            <p className="prose">
              The first line names the columns, in any order; group may be left out. Figures in SI, with a decimal
              point. Nothing is kept before you have seen the report.
            </p>
            <CodeBlock caption="a file" text={sample} label="A file to begin with" />
            <div className="field plain">
              <label className="label" htmlFor={id}>
                File
              </label>
              <input
                id={id}
                type="file"
                accept=".csv,text/csv"
                className="box"
                onChange={({ target: { files } }) => {
                  keep.reset()
                  if (files?.[0]) examine.mutate(files[0])
                }}
              />
            </div>
          </>
        )}
        <FormFailure error={keep.error ?? examine.error} words={words} />
        {report && <ImportRows report={report} />}
      </div>
      <div className="acts btnrow">
        {keep.data ? (
          <Button kind="main" onClick={onClose}>
            Done
          </Button>
        ) : (
          <>
            <SendButton
              kind="main"
              error={keep.error}
              disabled={!examine.data?.accepted || keep.isPending}
              onClick={() => keep.mutate()}
            >
              {keepText(examine.data?.accepted ?? 0, keep.isPending)}
            </SendButton>
            <Button onClick={onClose}>Cancel</Button>
          </>
        )}
      </div>
    </Dialog>
  )
}

function keepText(accepted: number, pending: boolean): string {
  if (pending) return 'Keeping'
  return accepted > 0 ? `Keep ${counted(accepted, 'row')}` : 'Keep the rows'
}
