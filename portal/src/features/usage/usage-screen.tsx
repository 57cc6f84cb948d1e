import { useQuery } from '@tanstack/react-query'
import { Suspense, lazy, useState } from 'react'
import { useSearchParams } from 'react-router-dom'
import { ButtonLink, LinkButton } from '../../components/button.tsx'
import { dayText, instantText, whole } from '../../components/formats.ts'
import { QueryView } from '../../components/query-view.tsx'
import { Segmented } from '../../components/segmented.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty, Loading } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { DayTable } from './day-table.tsx'
import { QuotaMeter } from './quota-meter.tsx'
import { seriesOf } from './series.ts'
import { type Usage, usageQuery } from './queries.ts'
import { UsageTable } from './usage-table.tsx'

const DayChart = lazy(() => import('./day-chart.tsx'))

const spans = ['7', '30', '90'] as const

export function UsageScreen() {
  const [search, setSearch] = useSearchParams()
  const days = spans.find((one) => one === search.get('days')) ?? '30'
  const byDay = useQuery(usageQuery(Number(days), 'day,key'))
  const byCase = useQuery(usageQuery(Number(days), 'key,case'))
  const usage = byDay.data
  const again = () => {
    void byDay.refetch()
    void byCase.refetch()
  }
  return (
    <Sheet title="Usage">
      <TitleBlock
        title="Usage"
        facts={
          usage
            ? [
                { name: 'Period', value: `${dayText(usage.from)} to ${dayText(usage.to)}, UTC`, full: true },
                { name: 'As of', value: <time dateTime={usage.asOf}>{instantText(usage.asOf)}</time> },
                {
                  name: 'Newer',
                  value: (
                    <LinkButton className="linkbtn !min-h-6 !p-0" onClick={again}>
                      Read again
                    </LinkButton>
                  ),
                },
                { name: 'Spent today', value: whole(usage.account.used) },
                { name: 'Left today', value: whole(usage.account.limit - usage.account.used) },
              ]
            : []
        }
      >
        <p className="prose">
          Every figure here is a sum of ledger rows. Refused and failed calls cost nothing and are counted apart.
        </p>
      </TitleBlock>
      <QueryView query={byDay} what="Summing the ledger.">
        {(data) => (
          <>
            <QuotaMeter account={data.account} asOf={data.asOf} />
            <Band tight label="Period">
              <Segmented
                label="Period"
                options={spans.map((value) => ({ value, text: `${value} days` }))}
                value={days}
                onChange={(value) => setSearch({ days: value })}
              />
            </Band>
            {data.total.calls + data.total.refused === 0 ? <NoCalls /> : <Days usage={data} />}
          </>
        )}
      </QueryView>
      {byCase.data && byCase.data.rows.length > 0 && (
        <Band label="By key and case">
          <UsageTable usage={byCase.data} />
        </Band>
      )}
    </Sheet>
  )
}

function Days({ usage }: { usage: Usage }) {
  const [view, setView] = useState<'chart' | 'table'>('chart')
  const series = seriesOf(usage.rows)
  return (
    <Band label="Points by day and key">
      <div className="btnrow justify-between mb-3">
        <h2>Points by day and key</h2>
        <Segmented
          label="Show as"
          options={[
            { value: 'chart', text: 'Chart' },
            { value: 'table', text: 'Table' },
          ]}
          value={view}
          onChange={(chosen) => setView(chosen)}
        />
      </div>
      {view === 'chart' ? (
        <Suspense fallback={<Loading what="Drawing." />}>
          <DayChart usage={usage} series={series} />
        </Suspense>
      ) : (
        <DayTable usage={usage} series={series} />
      )}
    </Band>
  )
}

function NoCalls() {
  return (
    <Band>
      <Empty title="No calls in this period">
        <p className="prose">The first one appears here within a second of its answer.</p>
        <ButtonLink kind="main" to="/cases">
          Find a first call
        </ButtonLink>
      </Empty>
    </Band>
  )
}
