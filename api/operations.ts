import { accountOperations } from './accounts/operations.ts'
import { runBatch } from './batches/operations.ts'
import { caseOperationList, tryOperations } from './cases/operations.ts'
import { catalogueOperations } from './catalogue/operations.ts'
import { healthOperations } from './health/operations.ts'
import { leakOperations } from './keys/leak-operations.ts'
import { keyOperations } from './keys/operations.ts'
import { materialOperations, memberMaterialOperations } from './materials/operations.ts'
import type { Operation } from './operation.ts'
import { keyRequest, memberRequestOperations } from './requests/operations.ts'
import { supportOperations } from './support/operations.ts'
import { keyUsage, memberUsage } from './usage/operations.ts'

/** Every endpoint of the service. Routes, documents and common tests are made from this list. */
export const operations: readonly Operation[] = [
  ...catalogueOperations,
  ...caseOperationList,
  runBatch,
  ...materialOperations,
  keyUsage,
  keyRequest,
  ...leakOperations,
  ...healthOperations,
  ...accountOperations,
  ...keyOperations,
  ...memberMaterialOperations,
  memberUsage,
  ...memberRequestOperations,
  ...tryOperations,
  ...supportOperations,
]
