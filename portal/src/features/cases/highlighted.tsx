import csharp from '@shikijs/langs/csharp'
import python from '@shikijs/langs/python'
import shellscript from '@shikijs/langs/shellscript'
import typescript from '@shikijs/langs/typescript'
import { toJsxRuntime } from 'hast-util-to-jsx-runtime'
import { use } from 'react'
import { Fragment, jsx, jsxs } from 'react/jsx-runtime'
import { createCssVariablesTheme, createHighlighterCore } from 'shiki/core'
import { createJavaScriptRegexEngine } from 'shiki/engine/javascript'
import type { Snippet } from '../../solving/snippets.ts'

const theme = createCssVariablesTheme({ name: 'sheet', variablePrefix: '--code-' })

const highlighter = createHighlighterCore({
  themes: [theme],
  langs: [shellscript, typescript, python, csharp],
  engine: createJavaScriptRegexEngine(),
})

/** Through a tree, never through HTML text: the policy of the page allows no inline styles. */
export default function Highlighted({ text, language }: { text: string; language: Snippet['language'] }) {
  const tree = use(highlighter).codeToHast(text, { lang: language, theme: 'sheet', structure: 'inline' })
  return <code>{toJsxRuntime(tree, { Fragment, jsx, jsxs })}</code>
}
