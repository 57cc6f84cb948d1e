import { Link, useRouteError } from 'react-router-dom'
import { Button } from '../components/button.tsx'
import { Page } from './page.tsx'
import { Masthead } from './masthead.tsx'
import { Band, Sheet } from '../components/sheet.tsx'
import { TitleBlock } from '../components/title-block.tsx'

/** Stands in for a sheet that failed to load or to draw. */
export function BrokenPage() {
  const error = useRouteError()
  return (
    <Page>
      <Masthead>
        <Link className="tool" to="/">
          Home
        </Link>
      </Masthead>
      <Sheet title="This sheet failed">
        <TitleBlock title="This sheet failed">
          <p className="prose">
            The page could not be shown. Nothing was charged. Loading it again may bring a newer version of the portal.
          </p>
        </TitleBlock>
        <Band>
          <p className="lab mb-4">{error instanceof Error ? error.message : String(error)}</p>
          <Button kind="main" onClick={() => location.reload()}>
            Load it again
          </Button>
        </Band>
      </Sheet>
    </Page>
  )
}
