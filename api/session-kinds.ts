/** Sessions of members and of staff: apart in cookie, table and length. */
export const sessionKinds = {
  member: { cookie: 'soakstone', tableName: 'sessions', hours: 12 },
  staff: { cookie: 'soakstone-staff', tableName: 'staff_sessions', hours: 8 },
} as const

export type SessionKind = keyof typeof sessionKinds

/** With https the browser is told to keep the cookie to this one host. */
export function cookieName(kind: SessionKind, https: boolean): string {
  return `${https ? '__Host-' : ''}${sessionKinds[kind].cookie}`
}
