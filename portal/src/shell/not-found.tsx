import { ButtonLink } from '../components/button.tsx'
import { Band, Sheet } from '../components/sheet.tsx'
import { Empty } from '../components/states.tsx'
import { TitleBlock } from '../components/title-block.tsx'

export function NotFound() {
  return (
    <Sheet title="No such sheet">
      <TitleBlock title="No such sheet" facts={[{ name: 'Status', value: '404' }]}>
        <p className="prose">Nothing stands at this address. It may have been mistyped.</p>
      </TitleBlock>
      <Band>
        <Empty title="Every case is in the catalogue">
          <ButtonLink kind="main" to="/cases">
            See the cases
          </ButtonLink>
        </Empty>
      </Band>
    </Sheet>
  )
}
