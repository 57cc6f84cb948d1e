import { useQuery } from '@tanstack/react-query'
import { Link, useSearchParams } from 'react-router-dom'
import { casesQuery } from '../../api/cases.ts'
import { problemsQuery } from '../../api/codes.ts'
import { LinkButton } from '../../components/button.tsx'
import { counted } from '../../components/formats.ts'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty, Failed, Loading } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { type Entry, caseEntries, codeEntries, found, guideEntries } from './finding.ts'
import { guides } from './guides.ts'

/** The guides, and one search over them, the cases and every code that an answer can carry. */
export function DocsScreen() {
  const [search, setSearch] = useSearchParams()
  const words = search.get('q') ?? ''
  const searching = words.trim() !== ''
  const cases = useQuery({ ...casesQuery(), enabled: searching })
  const codes = useQuery({ ...problemsQuery(), enabled: searching })
  const all = [...guideEntries(guides), ...caseEntries(cases.data?.cases ?? []), ...codeEntries(codes.data ?? [])]
  const entries = found(all, words)
  const error = cases.error ?? codes.error
  const go = (q: string) => setSearch(q ? { q } : {}, { replace: true, preventScrollReset: true, flushSync: true })
  return (
    <Sheet title="Docs">
      <TitleBlock
        title="Docs"
        facts={[
          { name: 'Guides', value: guides.length },
          { name: 'Contract', value: <a href="/v1/openapi.json">OpenAPI</a> },
        ]}
      >
        <p className="prose">
          Short guides for whoever builds with the API. Each call in them is answered as it stands.
        </p>
      </TitleBlock>
      <search className="band tight">
        <div className="btnrow">
          <label htmlFor="words" className="font-[560]">
            Find in guides, cases and codes
          </label>
          <input
            id="words"
            type="search"
            className="box max-w-[320px]"
            value={words}
            onChange={(event) => go(event.target.value)}
          />
          <span role="status" className="fig">
            {searching && !error && cases.data && codes.data && counted(entries.length, 'entry', 'entries')}
          </span>
        </div>
      </search>
      {searching ? (
        <Band label="Found">
          {error ? (
            <Failed error={error} retry={() => void Promise.all([cases.refetch(), codes.refetch()])} />
          ) : cases.data && codes.data ? (
            <Found entries={entries} clear={() => go('')} />
          ) : (
            <Loading what="Reading cases and codes." />
          )}
        </Band>
      ) : (
        <Band label="Guides">
          <EntryList entries={guideEntries(guides)} />
        </Band>
      )}
    </Sheet>
  )
}

function Found({ entries, clear }: { entries: readonly Entry[]; clear(): void }) {
  if (entries.length > 0) return <EntryList entries={entries} />
  return (
    <Empty title="Nothing has all of these words">
      <LinkButton onClick={clear}>Show the guides</LinkButton>
    </Empty>
  )
}

function EntryList({ entries }: { entries: readonly Entry[] }) {
  return (
    <ul className="entries">
      {entries.map(({ to, title, text, kind }) => (
        <li key={to}>
          <span className="lab">{kind}</span>
          <span className="min-w-0">
            <Link to={to}>{title}</Link>
            <span className="block text-ink-2">{text}</span>
          </span>
        </li>
      ))}
    </ul>
  )
}
