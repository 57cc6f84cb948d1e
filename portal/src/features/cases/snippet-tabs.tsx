import { CodeBlock } from '../../components/code-block.tsx'
import { Tabs } from '../../components/tabs.tsx'
import type { Body } from '../../solving/body.ts'
import { snippets } from '../../solving/snippets.ts'
import { SnippetCode } from './snippet-code.tsx'

interface Props {
  /** Of the API, from its root. */
  path: string
  body: Body
  caption: string
  /** Stands before the language in the name of each. */
  of?: string
  copy?: string
}

/** One call in every language. */
export function SnippetTabs({ path, body, caption, of = '', copy = 'Copy' }: Props) {
  const tabs = snippets.map(({ name, language, write }) => {
    const text = write(location.origin + path, body)
    return {
      name,
      content: (
        <CodeBlock caption={caption} text={text} label={`${of}${name} snippet`} copy={copy}>
          <SnippetCode text={text} language={language} />
        </CodeBlock>
      ),
    }
  })
  return <Tabs label={`${of}Language`} tabs={tabs} />
}
