import { ButtonLink } from '../../components/button.tsx'
import { CodeBlock } from '../../components/code-block.tsx'
import { Band } from '../../components/sheet.tsx'
import { snippets } from '../../solving/snippets.ts'
import { CASE, wallBody } from './wall.ts'

/** The way to the first answer, as a chain of dimensions. */
export function FirstAnswer({ film, hours }: { film: number; hours: number }) {
  const curl = snippets[0].write(`${location.origin}/v1/cases/${CASE}/solve`, wallBody(film, hours))
  return (
    <Band label="To the first answer">
      <h2>To the first answer</h2>
      <ol className="chain">
        <li>
          <span className="lab">1</span>
          <h3>Sign up</h3>
          <p className="prose">No card. The trial holds 100{'\u202f'}000 points a day.</p>
        </li>
        <li>
          <span className="lab">2</span>
          <h3>Make a trial key</h3>
          <p className="prose">
            Shown once. Put it in <code>SOAK_KEY</code>.
          </p>
        </li>
        <li>
          <span className="lab">3</span>
          <h3>Paste this</h3>
          <div className="mt-2">
            <CodeBlock caption="curl" text={curl} label="First call" />
          </div>
        </li>
        <li>
          <span className="lab">4</span>
          <h3>Read the answer</h3>
          <p className="prose">The same numbers as above, to the last digit.</p>
          <p className="mt-3">
            <ButtonLink kind="main" to="/sign-up">
              Get a key
            </ButtonLink>
          </p>
        </li>
      </ol>
    </Band>
  )
}
