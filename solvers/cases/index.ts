import type { Case } from '../case.ts'
import barRectangular from './bar-rectangular/case.ts'
import brickRectangular from './brick-rectangular/case.ts'
import cornerOctant from './corner-octant/case.ts'
import cylinderConvection from './cylinder-convection/case.ts'
import cylinderInInfiniteMedium from './cylinder-in-infinite-medium/case.ts'
import cylinderSurfaceTemperature from './cylinder-surface-temperature/case.ts'
import edgeQuarterSpace from './edge-quarter-space/case.ts'
import hollowCylinderConvection from './hollow-cylinder-convection/case.ts'
import lineSource from './line-source/case.ts'
import lumpedConvection from './lumped-convection/case.ts'
import lumpedVaryingAmbient from './lumped-varying-ambient/case.ts'
import pointSource from './point-source/case.ts'
import semiInfiniteBarEnd from './semi-infinite-bar-end/case.ts'
import semiInfiniteContact from './semi-infinite-contact/case.ts'
import semiInfiniteConvection from './semi-infinite-convection/case.ts'
import semiInfinitePeriodicAmbient from './semi-infinite-periodic-ambient/case.ts'
import semiInfinitePeriodicSurface from './semi-infinite-periodic-surface/case.ts'
import semiInfiniteSurfaceFlux from './semi-infinite-surface-flux/case.ts'
import semiInfiniteSurfaceRamp from './semi-infinite-surface-ramp/case.ts'
import semiInfiniteSurfaceTemperature from './semi-infinite-surface-temperature/case.ts'
import shortCylinderConvection from './short-cylinder-convection/case.ts'
import slabConvection from './slab-convection/case.ts'
import slabFiniteBath from './slab-finite-bath/case.ts'
import slabInitialProfile from './slab-initial-profile/case.ts'
import slabInternalHeat from './slab-internal-heat/case.ts'
import slabPeriodic from './slab-periodic/case.ts'
import slabSurfaceFlux from './slab-surface-flux/case.ts'
import slabSurfaceTemperature from './slab-surface-temperature/case.ts'
import slabTwoSides from './slab-two-sides/case.ts'
import sphereConvection from './sphere-convection/case.ts'
import sphereSurfaceTemperature from './sphere-surface-temperature/case.ts'

/** Every case of the product. Adding one is a folder beside this file and a line here. */
export const cases: readonly Case[] = [
  lumpedConvection,
  lumpedVaryingAmbient,
  semiInfiniteSurfaceTemperature,
  semiInfiniteSurfaceRamp,
  semiInfiniteSurfaceFlux,
  semiInfiniteConvection,
  semiInfinitePeriodicSurface,
  semiInfinitePeriodicAmbient,
  semiInfiniteContact,
  slabConvection,
  slabSurfaceTemperature,
  slabTwoSides,
  slabSurfaceFlux,
  slabInternalHeat,
  slabPeriodic,
  slabInitialProfile,
  slabFiniteBath,
  cylinderConvection,
  cylinderSurfaceTemperature,
  sphereConvection,
  sphereSurfaceTemperature,
  hollowCylinderConvection,
  cylinderInInfiniteMedium,
  barRectangular,
  brickRectangular,
  shortCylinderConvection,
  semiInfiniteBarEnd,
  edgeQuarterSpace,
  cornerOctant,
  lineSource,
  pointSource,
]
