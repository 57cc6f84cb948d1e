import { useQuery } from '@tanstack/react-query'
import { useSearchParams } from 'react-router-dom'
import { LinkButton } from '../../components/button.tsx'
import { counted } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { CaseGroup } from './case-group.tsx'
import { type CaseSummary, casesQuery } from './queries.ts'

export function CatalogueScreen() {
  const query = useQuery(casesQuery())
  const [search, setSearch] = useSearchParams()
  const words = search.get('q') ?? ''
  const cases = query.data?.cases ?? []
  const found = cases.filter((c) => matches(c, words))
  const waiting = query.isError ? '–' : 'reading'
  const families = [...new Set(found.map(({ family }) => family))]
  return (
    <Sheet title="Cases">
      <TitleBlock
        title="Cases"
        facts={[
          { name: 'Cases', value: query.data ? cases.length : waiting },
          { name: 'Shown', value: query.data ? found.length : waiting },
          {
            name: 'Operations',
            value:
              [...new Set(cases.flatMap(({ operations }) => operations.map(({ id }) => id)))].join(' · ') || waiting,
            full: true,
          },
        ]}
      >
        <p className="prose">
          Each case is one body with one boundary, and every answer states its bound.
          {cases.length > 1 && ' Pick what you can see in your problem.'}
        </p>
      </TitleBlock>
      <search className="band tight btnrow">
        <label htmlFor="words" className="font-[560]">
          Find by word
        </label>
        <input
          id="words"
          type="search"
          className="box max-w-[280px]"
          value={words}
          onChange={(event) => setSearch(event.target.value ? { q: event.target.value } : {}, { replace: true })}
        />
        <span role="status" className="fig">
          {query.data && `${counted(found.length, 'case')} of ${cases.length}`}
        </span>
        {words && <LinkButton onClick={() => setSearch({}, { replace: true })}>Clear</LinkButton>}
      </search>
      <QueryView
        query={query}
        what="Reading the catalogue."
        isEmpty={() => found.length === 0}
        empty={
          <div className="band">
            <Empty title="No case has all of that">
              <LinkButton onClick={() => setSearch({}, { replace: true })}>Clear the words above</LinkButton>
            </Empty>
          </div>
        }
      >
        {() =>
          families.map((family) => (
            <CaseGroup key={family} family={family} cases={found.filter((c) => c.family === family)} />
          ))
        }
      </QueryView>
    </Sheet>
  )
}

function matches(c: CaseSummary, words: string): boolean {
  const text = `${c.id} ${c.title} ${c.summary} ${c.family}`.toLowerCase()
  return words
    .toLowerCase()
    .split(/\s+/)
    .every((word) => text.includes(word))
}
