import { type ComponentType, createElement } from 'react'

interface Props {
  isAuthorized: boolean
  showPopup: boolean
  onClick(): void
  getComponent(name: string, container: true): ComponentType
}

function EnterKey({ isAuthorized, showPopup, onClick, getComponent }: Props) {
  return (
    <div className="auth-wrapper">
      <button type="button" className="btn" onClick={onClick}>
        {isAuthorized ? 'Change the key' : 'Enter a key'}
      </button>
      {showPopup && createElement(getComponent('authorizationPopup', true))}
    </div>
  )
}

/** One place to enter a key, in words; no padlock at each operation. */
export const keyPlugin = () => ({
  wrapComponents: {
    authorizeBtn: () => EnterKey,
    authorizeOperationBtn: () => () => null,
  },
})
