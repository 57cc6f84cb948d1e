import type { FormWords } from '../../api/form-words.ts'
import { unitText } from '../../components/formats.ts'
import type { Material, Typed } from './queries.ts'

/* What the sheets call the fields and the closed lists of a material. A name that the contract adds is missing here
   until it is given its words. */

export const states: Readonly<Record<Material['state'], string>> = {
  design: 'from a design table, at the moisture usual in use',
  dry: 'dry',
  moist: 'moist',
  frozen: 'frozen',
  liquid: 'liquid',
  solid: 'solid',
  gas: 'gas',
  unspecified: 'not known; each answer warns',
}

export const confidences: Readonly<Record<Material['confidence'], string>> = {
  high: 'a well-known table value',
  medium: 'typical within a range',
  low: 'the right order only; each answer warns',
}

export const labels: Readonly<Record<keyof Typed, string>> = {
  name: 'Name',
  group: 'Group',
  conductivity: 'Conductivity',
  density: 'Density',
  specificHeat: 'Specific heat',
  state: 'State',
  source: 'Source',
  confidence: 'Confidence',
}

export const units = { conductivity: 'W/(m.K)', density: 'kg/m3', specificHeat: 'J/(kg.K)' } as const

export const words: FormWords = {
  labels,
  units: Object.fromEntries(Object.values(units).map((code) => [code, unitText(code)])),
}
