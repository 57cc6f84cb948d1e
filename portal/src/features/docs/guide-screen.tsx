import { Link, useParams } from 'react-router-dom'
import { CodeBlock } from '../../components/code-block.tsx'
import { Tabs } from '../../components/tabs.tsx'
import { ButtonLink } from '../../components/button.tsx'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Empty } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'
import { snippets } from '../../solving/snippets.ts'
import type { Call, Part } from './guide.ts'
import { guides } from './guides.ts'
import { Worded } from './worded.tsx'

/** One guide: a few parts, each with its call in every language where it has one. */
export function GuideScreen() {
  const { slug = '' } = useParams()
  const at = guides.findIndex((one) => one.slug === slug)
  const guide = guides[at]
  if (!guide)
    return (
      <Sheet title="No such guide">
        <Band>
          <h1 className="mb-4">No such guide</h1>
          <Empty title={`There is no guide "${slug}"`}>
            <ButtonLink kind="main" to="/docs">
              All guides
            </ButtonLink>
          </Empty>
        </Band>
      </Sheet>
    )
  const next = guides[at + 1]
  return (
    <Sheet title={guide.title}>
      <TitleBlock title={guide.title} facts={[{ name: 'Guide', value: `${at + 1} of ${guides.length}`, full: true }]}>
        <p className="prose">{guide.summary}</p>
      </TitleBlock>
      {guide.parts.map((part) => (
        <GuidePart key={part.heading} part={part} />
      ))}
      <Band label="Further">
        <div className="btnrow">
          {guide.links?.map(({ to, text }) => (
            <ButtonLink key={to} to={to}>
              {text}
            </ButtonLink>
          ))}
          {next && (
            <span>
              Next: <Link to={`/docs/${next.slug}`}>{next.title}</Link>
            </span>
          )}
          <Link to="/docs">All guides</Link>
        </div>
      </Band>
    </Sheet>
  )
}

function GuidePart({ part: { heading, text, call } }: { part: Part }) {
  return (
    <Band label={heading}>
      <div className={call ? 'two' : undefined}>
        <div className="grid gap-3">
          <h2>{heading}</h2>
          {text.map((paragraph) => (
            <p key={paragraph} className="prose">
              <Worded text={paragraph} />
            </p>
          ))}
        </div>
        {call && <CallTabs call={call} of={heading} />}
      </div>
    </Band>
  )
}

function CallTabs({ call: { path, body }, of }: { call: Call; of: string }) {
  const tabs = snippets.map(({ name, write }) => ({
    name,
    content: <CodeBlock caption={path} text={write(location.origin + path, body)} label={`${of}, ${name}`} />,
  }))
  return (
    <div className="min-w-0">
      <Tabs label={`${of}, language`} tabs={tabs} />
    </div>
  )
}
