export const roles = ['owner', 'integrator', 'reader'] as const
export type Role = (typeof roles)[number]

/** What a key may be allowed, one or more. */
export const scopes = {
  solve: 'Ask questions of cases.',
  jobs: 'Start, follow and cancel jobs.',
  files: 'Keep files for jobs.',
  'materials:read': 'Read the catalogue of materials and those of the account.',
  'materials:write': 'Keep, change and delete materials of the account.',
  'usage:read': 'Read what the account has used.',
  'requests:read': 'Read calls that the account has made.',
  webhooks: 'Keep, change and delete webhooks.',
} as const

export type Scope = keyof typeof scopes
export const allScopes = Object.keys(scopes) as Scope[]

export const staffRoles = ['support', 'supervisor'] as const
export type StaffRole = (typeof staffRoles)[number]

/** How far a right reaches: everything of the account, or what the person made. */
export type Reach = 'all' | 'own'

/** Who may do what in an account. What is not written here is denied. */
export const permissions = {
  'session:read': { owner: 'all', integrator: 'all', reader: 'all' },
  'keys:read': { owner: 'all', integrator: 'own' },
  'keys:create': { owner: 'all', integrator: 'own' },
  'keys:change': { owner: 'all', integrator: 'own' },
  'keys:revoke': { owner: 'all', integrator: 'own' },
  'materials:read': { owner: 'all', integrator: 'all', reader: 'all' },
  'materials:write': { owner: 'all', integrator: 'own' },
  'usage:read': { owner: 'all', integrator: 'all', reader: 'all' },
  'requests:read': { owner: 'all', integrator: 'all', reader: 'all' },
} as const satisfies Record<string, Partial<Record<Role, Reach>>>

export type Permission = keyof typeof permissions

/** Who may do what among staff. What is not written here is denied. */
export const staffPermissions = {
  'staff-session:read': ['support', 'supervisor'],
  'any-request:find': ['support', 'supervisor'],
  'any-request:read': ['support', 'supervisor'],
} as const satisfies Record<string, readonly StaffRole[]>

export type StaffPermission = keyof typeof staffPermissions

export function reachOf(role: Role, permission: Permission): Reach | undefined {
  return (permissions[permission] as Partial<Record<Role, Reach>>)[role]
}

export function staffMay(role: StaffRole, permission: StaffPermission): boolean {
  return (staffPermissions[permission] as readonly StaffRole[]).includes(role)
}

/** Roles that hold a permission, for the documents. */
export function rolesWith(permission: Permission | StaffPermission): string[] {
  const entry: object = permission in permissions ? permissions[permission as Permission] : {}
  const staff = permission in staffPermissions ? staffPermissions[permission as StaffPermission] : []
  return [...Object.keys(entry), ...staff]
}

/** What a role may do, for the pages that show it. */
export function permissionsOf(role: Role): Permission[] {
  return (Object.keys(permissions) as Permission[]).filter((permission) => reachOf(role, permission))
}
