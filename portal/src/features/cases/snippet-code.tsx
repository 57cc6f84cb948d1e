import { Suspense, lazy } from 'react'
import type { Snippet } from '../../solving/snippets.ts'

const Highlighted = lazy(() => import('./highlighted.tsx'))

/** Plain until the highlighter has been read. */
export function SnippetCode({ text, language }: { text: string; language: Snippet['language'] }) {
  return (
    <Suspense fallback={<code>{text}</code>}>
      <Highlighted text={text} language={language} />
    </Suspense>
  )
}
