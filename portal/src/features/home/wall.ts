import { keepPreviousData, queryOptions } from '@tanstack/react-query'
import type { Field } from '../../figure/field.ts'
import { gridOf } from '../../figure/grid.ts'
import { gridValues } from '../../solving/grid-values.ts'
import { trySolve } from '../../solving/solve.ts'

export const CASE = 'slab-convection'
export const END_HOURS = 72

/** 360 mm of solid brick, insulated on the room side; the air outside drops to -10 °C. */
const wall = {
  conductivity: 0.81,
  density: 1800,
  specificHeat: 1000,
  thickness: 0.36,
  exposedFaces: 1,
  initialTemperature: 20,
  ambientTemperature: -10,
}

/** From still air to strong wind, evenly in the logarithm. */
export const filmAt = (position: number): number => Number((2 * 50 ** (position / 100)).toPrecision(3))

export const wallBody = (filmCoefficient: number, hours: number) => ({
  ...wall,
  filmCoefficient,
  depths: [0, 0.12, 0.24, 0.36],
  times: [hours * 3600],
})

/* Every half hour, and closer just after the change. */
const grid = gridOf({
  extent: wall.thickness,
  end: END_HOURS * 3600,
  depths: [],
  times: [],
  rows: 2 * END_HOURS,
  columns: 60,
})

export const fieldQuery = (filmCoefficient: number) =>
  queryOptions({
    queryKey: ['try', CASE, 'wall', filmCoefficient],
    queryFn: async ({ signal }): Promise<Field> => {
      const values = await gridValues(CASE, { ...wall, filmCoefficient, ...grid }, signal)
      return {
        places: grid.depths,
        along: 'depth',
        times: grid.times,
        values,
        initial: wall.initialTemperature,
        near: { kind: 'film', level: wall.ambientTemperature },
        far: { kind: 'insulated' },
      }
    },
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  })

export const answerQuery = (filmCoefficient: number, hours: number) =>
  queryOptions({
    queryKey: ['try', CASE, wallBody(filmCoefficient, hours)],
    queryFn: ({ signal }) => trySolve(CASE, wallBody(filmCoefficient, hours), signal),
    placeholderData: keepPreviousData,
    staleTime: Infinity,
  })
