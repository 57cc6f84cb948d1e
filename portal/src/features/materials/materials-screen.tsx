import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { Link, useSearchParams } from 'react-router-dom'
import { useMay } from '../../api/may.ts'
import { Button, ButtonLink, LinkButton } from '../../components/button.tsx'
import { counted } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { useSettled } from '../../solving/use-settled.ts'
import { CreateMaterial } from './create-material.tsx'
import { ImportMaterials } from './import-materials.tsx'
import { MaterialFilter } from './material-filter.tsx'
import { MaterialTable } from './material-table.tsx'
import { type Material, type Wish, listQuery } from './queries.ts'

/** The account's own materials and the catalogue, narrowed by words and group that stand in the address. */
export function MaterialsScreen() {
  const [search, setSearch] = useSearchParams()
  const mayWrite = useMay('materials:write')
  const [open, setOpen] = useState<'create' | 'import'>()
  const wish: Wish = { q: useSettled(search.get('q')?.trim() ?? ''), group: search.get('group') ?? '' }
  const cursor = search.get('cursor') ?? ''
  const own = useQuery(listQuery('account', { ...wish, cursor }))
  const catalogue = useQuery(listQuery('catalogue', wish))
  const narrowed = Boolean(wish.q || wish.group)
  const clear = () => setSearch({}, { replace: true })
  const known = (list: readonly Material[] | undefined) => (list ? counted(list.length, 'material') : '–')
  return (
    <Sheet title="Materials">
      <TitleBlock
        title="Materials"
        facts={[
          { name: 'Catalogue, shown', value: known(catalogue.data?.materials) },
          { name: 'Own, on this page', value: known(own.data?.materials) },
          { name: 'A solve takes', value: 'the id, as material', full: true },
        ]}
      >
        <p className="prose">
          Every material says where its figures come from, what they hold for and how sure they are. Answers repeat it.
        </p>
      </TitleBlock>
      <MaterialFilter search={search} setSearch={setSearch} />
      <Band label="Own materials">
        <div className="btnrow justify-between mb-4">
          <h2>Own materials</h2>
          {mayWrite && (
            <div className="btnrow">
              <Button onClick={() => setOpen('import')}>Import CSV</Button>
              <Button kind="main" onClick={() => setOpen('create')}>
                Keep a material
              </Button>
            </div>
          )}
        </div>
        {!mayWrite && (
          <p className="prose mb-4">Owners and integrators of the account keep its materials; your role reads them.</p>
        )}
        <QueryView
          query={own}
          what="Reading the materials of the account."
          isEmpty={({ materials }) => materials.length === 0}
          empty={
            narrowed || cursor ? (
              <Empty title="No own material fits">
                <LinkButton onClick={clear}>Show all</LinkButton>
              </Empty>
            ) : (
              <Empty title="No own materials yet">
                <p className="prose">
                  A material that is kept here is seen by the members and keys of the account alone. A solve names it by
                  its id.
                </p>
              </Empty>
            )
          }
        >
          {({ materials, next }) => (
            <>
              <MaterialTable caption="By name, 50 a page. Figures in SI." materials={materials} />
              <div className="btnrow mt-4">
                {next && <ButtonLink to={`?${pageOf(search, next)}`}>Further materials</ButtonLink>}
                {cursor && <Link to={`?${pageOf(search, undefined)}`}>From the first</Link>}
              </div>
            </>
          )}
        </QueryView>
      </Band>
      <Band label="Catalogue">
        <h2 className="mb-4">Catalogue</h2>
        <QueryView
          query={catalogue}
          what="Reading the catalogue."
          isEmpty={({ materials }) => materials.length === 0}
          empty={
            <Empty title="Nothing in the catalogue fits">
              <LinkButton onClick={clear}>Show all</LinkButton>
            </Empty>
          }
        >
          {({ materials }) => (
            <MaterialTable caption="Generic figures, to be compared with your product's own." materials={materials} />
          )}
        </QueryView>
      </Band>
      {open === 'create' && <CreateMaterial onClose={() => setOpen(undefined)} />}
      {open === 'import' && <ImportMaterials onClose={() => setOpen(undefined)} />}
    </Sheet>
  )
}

function pageOf(search: URLSearchParams, cursor: string | undefined): string {
  const next = new URLSearchParams(search)
  next.delete('cursor')
  if (cursor) next.set('cursor', cursor)
  return next.toString()
}
