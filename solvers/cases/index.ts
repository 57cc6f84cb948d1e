import type { Case } from '../case.ts'
import cylinderInInfiniteMedium from './cylinder-in-infinite-medium/case.ts'
import lineSource from './line-source/case.ts'
import lumpedConvection from './lumped-convection/case.ts'
import pointSource from './point-source/case.ts'
import semiInfiniteContact from './semi-infinite-contact/case.ts'
import semiInfiniteConvection from './semi-infinite-convection/case.ts'
import semiInfinitePeriodicAmbient from './semi-infinite-periodic-ambient/case.ts'
import semiInfinitePeriodicSurface from './semi-infinite-periodic-surface/case.ts'
import semiInfiniteSurfaceFlux from './semi-infinite-surface-flux/case.ts'
import semiInfiniteSurfaceRamp from './semi-infinite-surface-ramp/case.ts'
import semiInfiniteSurfaceTemperature from './semi-infinite-surface-temperature/case.ts'
import slabConvection from './slab-convection/case.ts'
import slabSurfaceTemperature from './slab-surface-temperature/case.ts'

/** Every case of the product. Adding one is a folder beside this file and a line here. */
export const cases: readonly Case[] = [
  lumpedConvection,
  semiInfiniteSurfaceTemperature,
  semiInfiniteSurfaceRamp,
  semiInfiniteSurfaceFlux,
  semiInfiniteConvection,
  semiInfinitePeriodicSurface,
  semiInfinitePeriodicAmbient,
  semiInfiniteContact,
  slabConvection,
  slabSurfaceTemperature,
  cylinderInInfiniteMedium,
  lineSource,
  pointSource,
]
