import { useQuery } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import { casesQuery } from '../../api/cases.ts'
import { LinkButton } from '../../components/button.tsx'
import { counted } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { CaseGroup } from './case-group.tsx'
import { FacetMarks } from './facet-marks.tsx'
import { marked, narrowed, narrowingIn, worded } from './narrowing.ts'
import type { CaseList } from './described.ts'

const none: CaseList = { cases: [], families: [], facets: [] }

/** Every case, narrowed by words and by marks that stand in the address. */
export function CatalogueScreen() {
  const query = useQuery(casesQuery())
  const [search, setSearch] = useSearchParams()
  const list = query.data ?? none
  const { cases } = list
  const narrowing = narrowingIn(search, list.facets)
  const found = narrowed(list, narrowing)
  const waiting = query.isError ? '–' : 'reading'
  const operations = [...new Set(cases.flatMap((c) => c.operations.map(({ id }) => id)))]
  const go = (next: URLSearchParams) => setSearch(next, { replace: true, preventScrollReset: true, flushSync: true })
  const clear = () => go(new URLSearchParams())
  return (
    <Sheet title="Cases">
      <TitleBlock
        title="Cases"
        facts={[
          { name: 'Cases', value: query.data ? cases.length : waiting },
          { name: 'Shown', value: query.data ? found.length : waiting },
          { name: 'Operations', value: operations.join(' · ') || waiting, full: true },
        ]}
      >
        <p className="prose">
          Each case is one body with one boundary, and every answer states its bound.
          {cases.length > 1 && ' Mark what you can see in your problem; the rest falls away.'}
        </p>
      </TitleBlock>
      <search className="band tight">
        <FacetMarks
          list={list}
          narrowing={narrowing}
          onMark={(facet, value, on) => go(marked(search, facet, value, on))}
        />
        <div className="btnrow pt-4">
          <label htmlFor="words" className="font-[560]">
            Find by word
          </label>
          <input
            id="words"
            type="search"
            className="box max-w-[280px]"
            value={narrowing.words}
            onChange={(event) => go(worded(search, event.target.value))}
          />
          <span role="status" className="fig">
            {query.data && `${found.length} of ${counted(cases.length, 'case')}`}
          </span>
          {search.size > 0 && <LinkButton onClick={clear}>Clear all</LinkButton>}
        </div>
      </search>
      <QueryView
        query={query}
        what="Reading the catalogue."
        isEmpty={() => found.length === 0}
        empty={
          <div className="band">
            <Empty title="No case has all of that">
              <p className="prose">Clear one mark above, or the words.</p>
              <LinkButton onClick={clear}>Clear all</LinkButton>
            </Empty>
          </div>
        }
      >
        {({ families }) =>
          families.map((family) => {
            const own = found.filter((c) => c.family === family.id)
            return own.length > 0 && <CaseGroup key={family.id} family={family} cases={own} />
          })
        }
      </QueryView>
    </Sheet>
  )
}
