import { figure } from '../statement/validate.ts'
import type { Warning } from '../warnings.ts'
import { genericMaterial } from './generic.ts'
import { type MaterialUsed, uncertaintyOf } from './material.ts'

/** Groups whose conductivity follows their moisture; metals, glass and plastics need no such care. */
const POROUS = ['concrete', 'masonry', 'stone', 'plaster', 'board', 'timber', 'insulation']

/** Heat of freezing in J/m3, where it is known, from memory. */
const latentHeats: Readonly<Record<string, number>> = {
  'soil-iso13793-unfrozen': 150e6,
  'water-10c': 333.6e6,
  'water-40c': 333.6e6,
  'food-lean-meat': 250e6,
}

/** Degrees Celsius at which the water in a material freezes. */
const FREEZES = 0

interface Use {
  material: MaterialUsed
  conductivity: number | undefined
  volumetricHeatCapacity: number | undefined
}

/** What a reader should know of the materials used, found wherever they stand in the resolved input. */
export function materialWarnings(echo: Record<string, unknown>): Warning[] {
  const uses = usesIn(echo)
  if (uses.length === 0) return []
  const temperatures = temperaturesIn(echo)
  return uses.flatMap((use) => [...ofConfidence(use), ...ofMoisture(use), ...ofPhase(use, echo, temperatures)])
}

function ofConfidence({ material: { id, confidence, source } }: Use): Warning[] {
  if (confidence !== 'low') return []
  const { conductivity: value, volumetricHeatCapacity } = uncertaintyOf[confidence]
  const shares = `${100 * value} % of the conductivity and ${100 * volumetricHeatCapacity} % of the heat capacity`
  const text = `${id} is known roughly only (${source}): a standard uncertainty of ${shares} is a start.`
  return [{ code: 'material-confidence-low', text, value }]
}

function ofMoisture({ material: { id, state }, conductivity, volumetricHeatCapacity }: Use): Warning[] {
  const group = genericMaterial(id)?.group
  const usual = state === 'design' && group !== undefined && POROUS.includes(group)
  if (!usual && state !== 'unspecified') return []
  const [used, value = 0] =
    conductivity === undefined
      ? [`volumetric heat capacity ${figure(volumetricHeatCapacity ?? 0)} J/(m3.K)`, volumetricHeatCapacity]
      : [`conductivity ${figure(conductivity)} W/(m.K)`, conductivity]
  const why = usual ? 'has the figures of a design table, for the moisture usual in use' : 'has no stated moisture'
  return [{ code: 'moisture-state-unspecified', text: `${id} ${why}; ${used} was used.`, value }]
}

function ofPhase(use: Use, echo: Record<string, unknown>, temperatures: readonly number[]): Warning[] {
  const { id, state } = use.material
  if ('phaseChangeTemperature' in echo) return []
  const wet = state === 'moist' || state === 'liquid'
  const cold = state === 'frozen' || (state === 'solid' && genericMaterial(id)?.group === 'water')
  const value = wet ? Math.min(...temperatures) : Math.max(...temperatures)
  if (!(wet && value < FREEZES) && !(cold && value > FREEZES)) return []
  const text = `${id} has the figures of the ${state} material, and a temperature of ${figure(value)} Cel lies beyond its freezing point. Latent heat is left out.`
  return [{ code: 'phase-change-crossed', text: text + stefanOf(use, value), value }]
}

/** Sensible against latent heat: where it is small, what is left out counts most. */
function stefanOf({ material, volumetricHeatCapacity }: Use, temperature: number): string {
  const latent = latentHeats[material.id]
  if (latent === undefined || volumetricHeatCapacity === undefined) return ''
  const stefan = (volumetricHeatCapacity * Math.abs(temperature - FREEZES)) / latent
  return ` The Stefan number is ${stefan.toPrecision(2)}.`
}

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null
const numberIn = (at: Record<string, unknown>, name: string) => {
  const value = at[name]
  return typeof value === 'number' ? value : undefined
}

/** Objects in an input, outside first; long lists of numbers are passed over. */
function objectsIn(value: unknown): Record<string, unknown>[] {
  if (!isObject(value)) return []
  if (Array.isArray(value)) return isObject(value[0]) ? value.flatMap(objectsIn) : []
  return [value, ...Object.values(value).flatMap(objectsIn)]
}

function usesIn(echo: Record<string, unknown>): Use[] {
  const uses = objectsIn(echo).flatMap((at) => {
    const material = at['material']
    if (!isObject(material)) return []
    const volumetricHeatCapacity = numberIn(at, 'volumetricHeatCapacity')
    return [
      {
        material: material as unknown as MaterialUsed,
        conductivity: numberIn(at, 'conductivity'),
        volumetricHeatCapacity,
      },
    ]
  })
  return [...new Map(uses.map((use) => [use.material.id, use])).values()]
}

function temperaturesIn(echo: Record<string, unknown>): number[] {
  return objectsIn(echo).flatMap((at) => {
    const named = Object.entries(at).flatMap(([name, value]) =>
      /temperature$/i.test(name) && typeof value === 'number' ? [value] : [],
    )
    const [mean, amplitude] = [numberIn(at, 'cycleMean'), numberIn(at, 'amplitude')]
    const swing = mean === undefined || amplitude === undefined ? [] : [mean - amplitude, mean + amplitude]
    return [...named, ...swing]
  })
}
