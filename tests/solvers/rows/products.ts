import { filmOf, heldOf, type Kinds, type Names, solidOf } from './ask.ts'

const driveOf = (i: Record<string, number>) => (i['film_W_m2K'] === undefined ? heldOf(i) : filmOf(i))
const common = (i: Record<string, number>) => ({ ...solidOf(i), ...driveOf(i), times: [i['time_s']] })

const open: Names = { temperature_C: 'temperature', theta: 'remainingFraction' }
const closed: Names = { ...open, average_C: 'meanTemperature', heat_fraction: 'heatFraction' }

const bar = (i: Record<string, number>) => ({
  width: 2 * i['half_width_x_m']!,
  height: 2 * i['half_width_y_m']!,
  widthFaces: 2,
  heightFaces: 2,
})

const file = 'E_products'

export const products: Kinds = {
  E1: {
    file,
    ask: (i) => ({
      caseId: 'edge-quarter-space',
      body: { ...common(i), points: [{ x: i['position_x_m'], y: i['position_y_m'] }] },
    }),
    names: open,
  },
  E2: {
    file,
    ask: (i) => ({
      caseId: 'bar-rectangular',
      body: { ...common(i), ...bar(i), points: [{ x: i['position_x_m'], y: i['position_y_m'] }] },
    }),
    names: closed,
  },
  E3: {
    file,
    ask: (i) => ({
      caseId: 'brick-rectangular',
      body: {
        ...common(i),
        ...bar(i),
        length: 2 * i['half_width_z_m']!,
        lengthFaces: 2,
        points: [{ x: i['position_x_m'], y: i['position_y_m'], z: i['position_z_m'] }],
      },
    }),
    names: closed,
  },
  E4: {
    file,
    ask: (i) => ({
      caseId: 'short-cylinder-convection',
      body: {
        ...common(i),
        radius: i['radius_m'],
        height: 2 * i['half_length_m']!,
        heightFaces: 2,
        points: [{ r: i['position_r_m'], z: i['position_z_m'] }],
      },
    }),
    names: closed,
  },
  E5: {
    file,
    ask: (i) => ({
      caseId: 'semi-infinite-bar-end',
      body: {
        ...common(i),
        thickness: 2 * i['half_thickness_m']!,
        thicknessFaces: 2,
        points: [{ x: i['position_x_m'], y: i['position_y_m'] }],
      },
    }),
    names: open,
  },
  E6: {
    file,
    ask: (i) => ({
      caseId: 'semi-infinite-bar-end',
      body: { ...common(i), radius: i['radius_m'], points: [{ x: i['position_x_m'], r: i['position_r_m'] }] },
    }),
    names: open,
  },
}
