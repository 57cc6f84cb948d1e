import type { Issue } from '../errors.ts'
import { genericMaterial } from './generic.ts'
import type { Material } from './material.ts'
import { OWN_PREFIX, OwnMaterial } from './own-material.ts'

/** What a field `material` holds once own materials stand in the place of their ids. */
export type MaterialInput = string | OwnMaterial

/** The material that is meant, or a refusal. */
export function findMaterial(given: MaterialInput, refuse: (issue: Issue) => void): Material | undefined {
  if (given instanceof OwnMaterial) return given
  const material = genericMaterial(given)
  if (material) return material
  const own = given.startsWith(OWN_PREFIX)
  const name = given.slice(0, 60)
  refuse({
    pointer: '#/material',
    code: 'material-unknown',
    detail: own
      ? `No material "${name}" can be used here. Materials of an account are known only to its own keys; without one, state the properties.`
      : `The catalogue has no material "${name}".`,
    accepted: 'the id of a material of the catalogue, such as concrete-dense-2400, or of one of the account',
  })
  return undefined
}
