/** A unit that a quantity may be given in: SI value = (value − zero) · factor, both exact. */
interface Unit {
  /** Decimals with `*` and `/` between them, read from left to right; no digit of it is rounded. */
  factor: string
  /** Reading at which the SI value is zero, of the scales of temperature. */
  zero?: string
}

interface Dimension {
  /** As its schema is called in the contract. */
  name: string
  /** By UCUM code; the first is that of a plain number. */
  units: Readonly<Record<string, Unit>>
}

const by = (factor: string): Unit => ({ factor })
const one = by('1')

/* International table British thermal unit in J, pound in kg, foot in m, and degrees Rankine in a kelvin. */
const [BTU, LB, FT, PER_R] = ['1055.05585262', '0.45359237', '0.3048', '1.8']
const KCAL = '4186.8'

/**
 * Every unit that a quantity takes, by the UCUM code of the quantity's SI unit. The one place where they are listed: what
 * is accepted, the contract and docs/units.md follow from it.
 */
export const dimensions: Readonly<Record<string, Dimension>> = {
  m: {
    name: 'Length',
    units: {
      m: one,
      km: by('1000'),
      cm: by('0.01'),
      mm: by('0.001'),
      um: by('0.000001'),
      '[in_i]': by('0.0254'),
      '[ft_i]': by(FT),
      '[yd_i]': by('0.9144'),
    },
  },
  m2: {
    name: 'Area',
    units: {
      m2: one,
      cm2: by('0.0001'),
      mm2: by('1e-6'),
      '[in_i]2': by('0.0254*0.0254'),
      '[ft_i]2': by(`${FT}*${FT}`),
    },
  },
  m3: {
    name: 'Volume',
    units: {
      m3: one,
      L: by('0.001'),
      mL: by('1e-6'),
      cm3: by('1e-6'),
      mm3: by('1e-9'),
      '[in_i]3': by('0.0254*0.0254*0.0254'),
      '[ft_i]3': by(`${FT}*${FT}*${FT}`),
    },
  },
  s: {
    name: 'Time',
    units: {
      s: one,
      ms: by('0.001'),
      min: by('60'),
      h: by('3600'),
      d: by('86400'),
      wk: by('604800'),
      a: by('31557600'),
    },
  },
  Cel: {
    name: 'Temperature',
    units: { Cel: one, K: { factor: '1', zero: '273.15' }, '[degF]': { factor: '1/1.8', zero: '32' } },
  },
  K: { name: 'TemperatureDifference', units: { K: one, mK: by('0.001'), '[degR]': by(`1/${PER_R}`) } },
  'K/s': {
    name: 'TemperatureRate',
    units: {
      'K/s': one,
      'K/min': by('1/60'),
      'K/h': by('1/3600'),
      'K/d': by('1/86400'),
      '[degR]/min': by(`1/${PER_R}/60`),
      '[degR]/h': by(`1/${PER_R}/3600`),
    },
  },
  'K.s': {
    name: 'TemperatureTime',
    units: { 'K.s': one, 'K.h': by('3600'), 'K.d': by('86400'), '[degR].d': by(`86400/${PER_R}`) },
  },
  'W/(m.K)': {
    name: 'Conductivity',
    units: {
      'W/(m.K)': one,
      'W/m/K': one,
      'mW/(m.K)': by('0.001'),
      'W/(cm.K)': by('100'),
      'kcal_IT/(h.m.K)': by(`${KCAL}/3600`),
      '[Btu_IT]/(h.[ft_i].[degR])': by(`${BTU}*${PER_R}/3600/${FT}`),
      '[Btu_IT].[in_i]/(h.[ft_i]2.[degR])': by(`${BTU}*${PER_R}*0.0254/3600/${FT}/${FT}`),
    },
  },
  'kg/m3': {
    name: 'Density',
    units: {
      'kg/m3': one,
      't/m3': by('1000'),
      'g/cm3': by('1000'),
      'kg/L': by('1000'),
      'g/L': one,
      '[lb_av]/[ft_i]3': by(`${LB}/${FT}/${FT}/${FT}`),
    },
  },
  'J/(kg.K)': {
    name: 'SpecificHeat',
    units: {
      'J/(kg.K)': one,
      'J/kg/K': one,
      'kJ/(kg.K)': by('1000'),
      'J/(g.K)': by('1000'),
      'W.h/(kg.K)': by('3600'),
      'kcal_IT/(kg.K)': by(KCAL),
      '[Btu_IT]/([lb_av].[degR])': by(`${BTU}*${PER_R}/${LB}`),
    },
  },
  'J/(m3.K)': {
    name: 'VolumetricHeatCapacity',
    units: {
      'J/(m3.K)': one,
      'kJ/(m3.K)': by('1000'),
      'MJ/(m3.K)': by('1000000'),
      'J/(cm3.K)': by('1000000'),
      'W.h/(m3.K)': by('3600'),
      '[Btu_IT]/([ft_i]3.[degR])': by(`${BTU}*${PER_R}/${FT}/${FT}/${FT}`),
    },
  },
  'm2/s': {
    name: 'Diffusivity',
    units: {
      'm2/s': one,
      'cm2/s': by('0.0001'),
      'mm2/s': by('1e-6'),
      'm2/h': by('1/3600'),
      '[ft_i]2/h': by(`${FT}*${FT}/3600`),
    },
  },
  'W/(m2.K)': {
    name: 'FilmCoefficient',
    units: {
      'W/(m2.K)': one,
      'W/m2/K': one,
      'kW/(m2.K)': by('1000'),
      'kcal_IT/(h.m2.K)': by(`${KCAL}/3600`),
      '[Btu_IT]/(h.[ft_i]2.[degR])': by(`${BTU}*${PER_R}/3600/${FT}/${FT}`),
    },
  },
  'm2.K/W': {
    name: 'Resistance',
    units: {
      'm2.K/W': one,
      'h.[ft_i]2.[degR]/[Btu_IT]': by(`3600*${FT}*${FT}/${PER_R}/${BTU}`),
    },
  },
  'W/m2': {
    name: 'HeatFlux',
    units: {
      'W/m2': one,
      'kW/m2': by('1000'),
      'W/cm2': by('10000'),
      '[Btu_IT]/(h.[ft_i]2)': by(`${BTU}/3600/${FT}/${FT}`),
    },
  },
  W: {
    name: 'Power',
    units: { W: one, mW: by('0.001'), kW: by('1000'), MW: by('1e6'), '[Btu_IT]/h': by(`${BTU}/3600`) },
  },
  'W/m': {
    name: 'LinePower',
    units: { 'W/m': one, 'kW/m': by('1000'), 'W/cm': by('100'), '[Btu_IT]/(h.[ft_i])': by(`${BTU}/3600/${FT}`) },
  },
  'W/m3': {
    name: 'PowerDensity',
    units: {
      'W/m3': one,
      'kW/m3': by('1000'),
      'W/L': by('1000'),
      '[Btu_IT]/(h.[ft_i]3)': by(`${BTU}/3600/${FT}/${FT}/${FT}`),
    },
  },
  J: {
    name: 'Energy',
    units: { J: one, kJ: by('1000'), MJ: by('1e6'), 'W.h': by('3600'), 'kW.h': by('3600000'), '[Btu_IT]': by(BTU) },
  },
  'J/K': {
    name: 'HeatCapacity',
    units: {
      'J/K': one,
      'kJ/K': by('1000'),
      'MJ/K': by('1e6'),
      'W.h/K': by('3600'),
      '[Btu_IT]/[degR]': by(`${BTU}*${PER_R}`),
    },
  },
  'J/(m2.K)': {
    name: 'ArealHeatCapacity',
    units: {
      'J/(m2.K)': one,
      'kJ/(m2.K)': by('1000'),
      'W.h/(m2.K)': by('3600'),
      '[Btu_IT]/([ft_i]2.[degR])': by(`${BTU}*${PER_R}/${FT}/${FT}`),
    },
  },
  'J/m3': {
    name: 'LatentHeat',
    units: {
      'J/m3': one,
      'kJ/m3': by('1000'),
      'MJ/m3': by('1e6'),
      'W.h/m3': by('3600'),
      '[Btu_IT]/[ft_i]3': by(`${BTU}/${FT}/${FT}/${FT}`),
    },
  },
  'J/mol': { name: 'MolarEnergy', units: { 'J/mol': one, 'kJ/mol': by('1000') } },
  '1': { name: 'Ratio', units: { '1': one, '%': by('0.01') } },
}

/** The codes that a quantity takes, by the code of its SI unit. */
export function acceptedUnits(si: string): readonly string[] {
  return Object.hasOwn(dimensions, si) ? Object.keys(dimensions[si]!.units) : [si]
}

export function unitOf(si: string, code: string): Unit | undefined {
  if (code === si) return one
  const units = Object.hasOwn(dimensions, si) ? dimensions[si]!.units : {}
  return Object.hasOwn(units, code) ? units[code] : undefined
}
