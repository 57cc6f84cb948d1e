import { useState } from 'react'
import { createPortal } from 'react-dom'
import { EnterKey } from './enter-key.tsx'

/** What the explorer gives its plug-ins, as far as it is used here. */
interface System {
  preauthorizeApiKey(scheme: string, value: string): unknown
  specSelectors: { securityDefinitions(): { keySeq(): { first(): string } } }
}

/** The button in place of the explorer's own. */
function keyButton(system: System) {
  return function KeyButton({ isAuthorized }: { isAuthorized: boolean }) {
    const [asking, setAsking] = useState(false)
    const use = (key: string) => {
      system.preauthorizeApiKey(system.specSelectors.securityDefinitions().keySeq().first(), key)
      setAsking(false)
    }
    return (
      <div className="auth-wrapper">
        <button type="button" className="btn" onClick={() => setAsking(true)}>
          {isAuthorized ? 'Change the key' : 'Enter a key'}
        </button>
        {asking && createPortal(<EnterKey onUse={use} onClose={() => setAsking(false)} />, document.body)}
      </div>
    )
  }
}

/** One place to enter a key, in words; no padlock at each operation. */
export const keyPlugin = () => ({
  wrapComponents: {
    authorizeBtn: (_original: unknown, system: System) => keyButton(system),
    authorizeOperationBtn: () => () => null,
  },
})
