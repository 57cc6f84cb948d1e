import { useOutletContext } from 'react-router-dom'

/** What the role of the session may do, as the service says; the sheets of an account are handed it. */
export type Permissions = readonly string[]

/** Whether to offer what a permission covers. The service decides anew on each call. */
export const useMay = (permission: string): boolean => useOutletContext<Permissions>().includes(permission)
