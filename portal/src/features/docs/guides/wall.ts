import type { Body } from '../../../solving/body.ts'

/** The wall of the guides: its face and its middle after 1 and 10 hours. */
const body: Body = {
  thickness: 0.2,
  exposedFaces: 2,
  filmCoefficient: 10,
  initialTemperature: 20,
  ambientTemperature: -5,
}

export const wall: Body = { conductivity: 2, density: 2400, specificHeat: 1000, ...body }
export const places: Body = { depths: [0, 0.1], times: [3600, 36000] }

export const pathOf = (operation: string, caseId = 'slab-convection') => `/v1/cases/${caseId}/${operation}`
