import createClient from 'openapi-fetch'
import type { paths as PublicPaths } from '../../../openapi/openapi.d.ts'
import type { paths as PortalPaths } from '../../../openapi/portal.d.ts'
import type { paths as SupportPaths } from '../../../openapi/support.d.ts'

const options = { baseUrl: globalThis.location?.origin ?? '', credentials: 'same-origin' as const }

export const publicApi = createClient<PublicPaths>(options)
export const portalApi = createClient<PortalPaths>(options)
export const supportApi = createClient<SupportPaths>(options)
