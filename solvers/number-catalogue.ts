/** What `numbers` of an answer may hold: beside each name its unit and what it says. Series follow the times or the places. */
export const numberCatalogue = {
  biot: { unit: '1', series: false, text: 'Biot number hL/k.' },
  fourier: { unit: '1', series: true, text: 'Fourier number at/L², one a time.' },
  length: { unit: 'm', series: false, text: 'The length L that the Biot and Fourier numbers were made with.' },
  penetrationDepth: {
    unit: 'm',
    series: false,
    text: 'Depth that 1 % of a surface step has reached at the last time; in a settled cycle, where 1 % of the amplitude of the surface is left.',
  },
  slowestTimeConstant: {
    unit: 's',
    series: false,
    text: 'Time in which the slowest part of the change falls to 1/e: L²/(z₁²a).',
  },
  lagTime: {
    unit: 's',
    series: false,
    text: 'Where the straight line of the slowest part crosses the start, at the centre, the mid-plane or the insulated face.',
  },
  fValue: {
    unit: 's',
    series: false,
    text: 'Time in which the remaining difference falls to a tenth: ln(10)·L²/(z₁²a).',
  },
  jValue: {
    unit: '1',
    series: true,
    text: 'Lag factor of each place: what the slowest part would be there at the start, as a share of the change of that place; C₁ times the first eigenfunction.',
  },
  filmForHeldFace: {
    unit: 'W/(m2.K)',
    series: false,
    text: 'Film coefficient from which a face that is held stands for one in a fluid. With a weaker film times come out early, by about 2/(Bi + 2) of them; that is 1 % here, in a half space 1 % of the step at the face at the first time.',
  },
  validUntil: {
    unit: 's',
    series: false,
    text: 'Time until which a body of the given thickness or length follows this case to 1 %.',
  },
  validFrom: {
    unit: 's',
    series: false,
    text: 'Time from which the first term alone is right to 1 % of the change: of a series, or the straight line over ln t of a source.',
  },
  driftRate: {
    unit: 'K/s',
    series: false,
    text: 'Rate at which the mean goes on changing where there is no steady state.',
  },
  cyclesToSettle: {
    unit: '1',
    series: false,
    text: 'Whole cycles after which a start at the mean has settled to 1 % of the amplitude.',
  },
} as const satisfies Record<string, { unit: string; series: boolean; text: string }>

export type NumberName = keyof typeof numberCatalogue
