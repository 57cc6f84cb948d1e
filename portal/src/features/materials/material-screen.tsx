import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useParams } from 'react-router-dom'
import { ApiError } from '../../api/api-error.ts'
import { useMay } from '../../api/may.ts'
import { Button, ButtonLink, LinkButton } from '../../components/button.tsx'
import { CodeBlock } from '../../components/code-block.tsx'
import { instantText, unitText } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { plain } from '../../figure/measures.ts'
import { ChangeMaterial } from './change-material.tsx'
import { DeleteMaterial } from './delete-material.tsx'
import { type Material, materialQuery } from './queries.ts'
import { confidences, states } from './words.ts'

/** One material: its figures, what they hold for, and how a call names it. */
export function MaterialScreen() {
  const { materialId = '' } = useParams()
  const query = useQuery(materialQuery(materialId))
  const mayWrite = useMay('materials:write')
  const [open, setOpen] = useState<'change' | 'delete'>()
  const material = query.data?.data
  const title = material?.name ?? 'Material'
  const close = () => setOpen(undefined)
  return (
    <Sheet title={title}>
      <TitleBlock title={title} facts={material ? factsOf(material) : []}>
        {material && <p className="prose">Source: {material.source}.</p>}
      </TitleBlock>
      <Band>
        {query.error instanceof ApiError && query.error.status === 404 ? (
          <Empty title="There is no such material">
            <p className="prose">Neither the catalogue nor the account has one with the id {materialId}.</p>
          </Empty>
        ) : (
          <QueryView query={query} what="Reading the material.">
            {({ data }) => (
              <>
                <Figures material={data} />
                {data.of === 'account' && mayWrite && (
                  <div className="btnrow mt-5">
                    <Button onClick={() => setOpen('change')}>Change it</Button>
                    <LinkButton risk onClick={() => setOpen('delete')}>
                      Delete it
                    </LinkButton>
                  </div>
                )}
              </>
            )}
          </QueryView>
        )}
        <div className="btnrow mt-5">
          <ButtonLink to="/materials">All materials</ButtonLink>
        </div>
      </Band>
      {query.data && open === 'change' && <ChangeMaterial of={query.data} onClose={close} />}
      {material && open === 'delete' && <DeleteMaterial of={material} onClose={close} />}
    </Sheet>
  )
}

function factsOf({ id, of, group, updatedAt }: Material) {
  return [
    { name: 'Id', value: id, full: true },
    { name: 'Of', value: of === 'account' ? 'the account' : 'the catalogue' },
    { name: 'Group', value: group },
    ...(updatedAt ? [{ name: 'Changed, UTC', value: instantText(updatedAt), full: true }] : []),
  ]
}

const rows = [
  ['conductivity', 'k', 'Conductivity', 'W/(m.K)'],
  ['density', 'ρ', 'Density', 'kg/m3'],
  ['specificHeat', 'c', 'Specific heat', 'J/(kg.K)'],
  ['volumetricHeatCapacity', 'C', 'Volumetric heat capacity', 'J/(m3.K)'],
  ['diffusivity', 'a', 'Diffusivity', 'm2/s'],
  ['effusivity', 'e', 'Effusivity', 'W.s0.5/(m2.K)'],
] as const

function Figures({ material }: { material: Material }) {
  const { state, confidence, relativeUncertainty } = material
  const percent = (part: number) => `${plain(100 * part)} %`
  return (
    <div className="two">
      <div>
        <h2 className="mb-4">Figures</h2>
        <table className="table">
          <caption>The last three follow from the first.</caption>
          <tbody>
            {rows.map(([name, symbol, label, unit]) => (
              <tr key={name}>
                <th scope="row">
                  {label}, <i>{symbol}</i>
                </th>
                <td className="num">
                  {plain(material[name], 6)} <span className="lab">{unitText(unit.replace('s0.5', 's½'))}</span>
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      <div className="grid gap-4 min-w-0">
        <h2>What they hold for</h2>
        <p className="prose">
          State <b>{state}</b>: {states[state]}.
        </p>
        <p className="prose">
          Confidence <b>{confidence}</b>: {confidences[confidence]}. Standard uncertainty to start from:{' '}
          {percent(relativeUncertainty.conductivity)} of the conductivity,{' '}
          {percent(relativeUncertainty.volumetricHeatCapacity)} of the heat capacity.
        </p>
        <CodeBlock
          caption="in the body of a call, in place of all properties"
          text={`"material": "${material.id}"`}
          label="How a call names it"
        />
      </div>
    </div>
  )
}
