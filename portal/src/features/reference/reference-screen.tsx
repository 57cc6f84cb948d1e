import { Suspense, lazy } from 'react'
import { Band, Sheet } from '../../components/sheet.tsx'
import { Loading } from '../../components/states.tsx'
import { TitleBlock } from '../../components/title-block.tsx'

const Explorer = lazy(() => import('./explorer.tsx'))

export function ReferenceScreen() {
  return (
    <Sheet title="Reference">
      <TitleBlock
        title="Reference"
        facts={[
          { name: 'Contract', value: <a href="/v1/openapi.json">/v1/openapi.json</a>, full: true },
          { name: 'Form', value: 'OpenAPI 3.1' },
          { name: 'Address', value: `${location.origin}/v1` },
        ]}
      >
        <p className="prose">
          Every operation of the public API, to read and to try. A key that you enter stays in this page and is
          forgotten when you leave it. Calls made here with a key are metered like any other.
        </p>
      </TitleBlock>
      <Band>
        <Suspense fallback={<Loading what="Reading the contract." />}>
          <Explorer />
        </Suspense>
      </Band>
    </Sheet>
  )
}
