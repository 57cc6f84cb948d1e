import type { Confidence, Material, State } from './material.ts'

/* Sources, from memory: figures recalled from these tables, to be compared with the current edition before they carry weight. */
const TABLE = 'ISO 10456 Table 3 (EN 12524 lineage)'
const MASONRY = 'EN 1745 / national design tables'
const INSULATION = 'ISO 10456 Table 4 (specific heat) + typical declared conductivity'
const HANDBOOK = 'general handbook'

/** Id, name, conductivity W/(m.K), density kg/m3, specific heat J/(kg.K), state, source, confidence. */
type Row = readonly [string, string, number, number, number, State, string, Confidence]

const groups: Readonly<Record<string, readonly Row[]>> = {
  concrete: [
    ['concrete-medium-1800', 'Concrete, medium density 1800', 1.15, 1800, 1000, 'design', TABLE, 'high'],
    ['concrete-medium-2000', 'Concrete, medium density 2000', 1.35, 2000, 1000, 'design', TABLE, 'high'],
    ['concrete-medium-2200', 'Concrete, medium density 2200', 1.65, 2200, 1000, 'design', TABLE, 'high'],
    ['concrete-dense-2400', 'Concrete, high density 2400', 2, 2400, 1000, 'design', TABLE, 'high'],
    ['concrete-reinforced-1pc', 'Reinforced concrete, 1 % steel', 2.3, 2300, 1000, 'design', TABLE, 'high'],
    ['concrete-reinforced-2pc', 'Reinforced concrete, 2 % steel', 2.5, 2400, 1000, 'design', TABLE, 'high'],
    ['concrete-fresh', 'Fresh / hydrating dense concrete', 2.4, 2400, 1050, 'moist', HANDBOOK, 'medium'],
    ['concrete-lightweight-1200', 'Lightweight aggregate concrete 1200', 0.45, 1200, 1000, 'design', MASONRY, 'low'],
  ],
  masonry: [
    ['aac-500', 'Autoclaved aerated concrete 500', 0.14, 500, 1000, 'design', MASONRY, 'low'],
    ['aac-400', 'Autoclaved aerated concrete 400', 0.11, 400, 1000, 'design', MASONRY, 'low'],
    ['clay-brick-solid-1800', 'Clay brick masonry, solid 1800', 0.81, 1800, 1000, 'design', MASONRY, 'medium'],
    ['clay-brick-1400', 'Clay block masonry 1400', 0.58, 1400, 1000, 'design', MASONRY, 'low'],
    ['clay-block-800', 'Perforated clay block masonry 800', 0.25, 800, 1000, 'design', MASONRY, 'low'],
    ['calcium-silicate-1800', 'Calcium-silicate masonry 1800', 0.99, 1800, 1000, 'design', MASONRY, 'medium'],
    ['calcium-silicate-2000', 'Calcium-silicate masonry 2000', 1.1, 2000, 1000, 'design', MASONRY, 'medium'],
    ['adobe-1600', 'Earth / adobe 1600', 0.73, 1600, 1000, 'design', HANDBOOK, 'low'],
  ],
  stone: [
    ['stone-granite', 'Granite', 2.8, 2600, 1000, 'design', TABLE, 'high'],
    ['stone-basalt', 'Basalt', 3.5, 2850, 1000, 'design', TABLE, 'medium'],
    ['stone-marble', 'Marble', 3.5, 2800, 1000, 'design', TABLE, 'high'],
    ['stone-slate', 'Slate', 2.2, 2400, 1000, 'design', TABLE, 'medium'],
    ['stone-limestone-semi-hard', 'Limestone, semi-hard', 1.4, 2000, 1000, 'design', TABLE, 'high'],
    ['stone-limestone-hard', 'Limestone, hard', 1.7, 2200, 1000, 'design', TABLE, 'high'],
    ['stone-sandstone', 'Sandstone (silica)', 2.3, 2600, 1000, 'design', TABLE, 'high'],
  ],
  plaster: [
    ['plaster-gypsum-1000', 'Gypsum plaster 1000', 0.4, 1000, 1000, 'design', TABLE, 'high'],
    ['plaster-gypsum-1300', 'Gypsum plaster 1300', 0.57, 1300, 1000, 'design', TABLE, 'high'],
    ['plaster-lime-sand', 'Lime-sand plaster', 0.8, 1600, 1000, 'design', TABLE, 'high'],
    ['render-cement-sand', 'Cement-sand render / screed', 1, 1800, 1000, 'design', TABLE, 'high'],
    ['screed-cement', 'Cement screed', 1.4, 2000, 1000, 'design', MASONRY, 'medium'],
    ['screed-anhydrite', 'Calcium-sulfate (anhydrite) screed', 1.6, 2100, 1000, 'design', MASONRY, 'low'],
  ],
  board: [
    ['gypsum-board-700', 'Gypsum plasterboard 700', 0.21, 700, 1000, 'design', TABLE, 'high'],
    ['gypsum-board-900', 'Gypsum plasterboard 900', 0.25, 900, 1000, 'design', TABLE, 'high'],
  ],
  timber: [
    ['timber-450', 'Softwood 450 (across grain)', 0.12, 450, 1600, 'design', TABLE, 'high'],
    ['timber-500', 'Softwood 500 (across grain)', 0.13, 500, 1600, 'design', TABLE, 'high'],
    ['timber-700', 'Hardwood 700 (across grain)', 0.18, 700, 1600, 'design', TABLE, 'high'],
    ['plywood-500', 'Plywood 500', 0.13, 500, 1600, 'design', TABLE, 'high'],
    ['particleboard-600', 'Particleboard 600', 0.14, 600, 1700, 'design', TABLE, 'high'],
    ['osb-650', 'Oriented strand board 650', 0.13, 650, 1700, 'design', TABLE, 'high'],
    ['fibreboard-600', 'Wood fibreboard 600', 0.14, 600, 1700, 'design', TABLE, 'high'],
    ['cement-particleboard', 'Cement-bonded particleboard', 0.23, 1200, 1500, 'design', TABLE, 'high'],
  ],
  insulation: [
    ['mineral-wool', 'Mineral wool (typical)', 0.035, 30, 1030, 'dry', INSULATION, 'medium'],
    ['mineral-wool-dense', 'Mineral wool board, dense (typical)', 0.038, 120, 1030, 'dry', INSULATION, 'medium'],
    ['eps', 'Expanded polystyrene (typical)', 0.035, 20, 1450, 'dry', INSULATION, 'medium'],
    ['xps', 'Extruded polystyrene (typical)', 0.035, 35, 1450, 'dry', INSULATION, 'medium'],
    ['pur', 'Rigid polyurethane (typical)', 0.025, 35, 1400, 'dry', INSULATION, 'medium'],
    ['phenolic-foam', 'Phenolic foam (typical)', 0.022, 35, 1400, 'dry', INSULATION, 'medium'],
    ['cellular-glass', 'Cellular glass (typical)', 0.042, 120, 1000, 'dry', INSULATION, 'medium'],
    ['wood-fibre-insulation', 'Wood-fibre insulation (typical)', 0.042, 160, 2000, 'dry', INSULATION, 'medium'],
    ['cellulose-loose', 'Cellulose fill (typical)', 0.04, 50, 1600, 'dry', INSULATION, 'medium'],
    ['cork-expanded', 'Expanded cork board (typical)', 0.042, 120, 1560, 'dry', INSULATION, 'medium'],
    ['wood-wool-board', 'Wood-wool cement board (typical)', 0.085, 400, 1470, 'dry', INSULATION, 'low'],
    ['vip', 'Vacuum panel, aged design value', 0.008, 200, 800, 'design', HANDBOOK, 'low'],
  ],
  glass: [['glass-soda-lime', 'Soda-lime glass', 1, 2500, 750, 'design', TABLE, 'high']],
  metal: [
    ['steel', 'Steel', 50, 7800, 450, 'design', TABLE, 'high'],
    ['stainless-austenitic', 'Stainless steel, austenitic', 17, 7900, 500, 'design', TABLE, 'medium'],
    ['aluminium-alloy', 'Aluminium alloy', 160, 2800, 880, 'design', TABLE, 'high'],
    ['copper', 'Copper', 380, 8900, 380, 'design', TABLE, 'high'],
    ['brass', 'Brass', 120, 8400, 380, 'design', TABLE, 'high'],
    ['cast-iron', 'Cast iron', 50, 7500, 450, 'design', TABLE, 'high'],
    ['lead', 'Lead', 35, 11300, 130, 'design', TABLE, 'high'],
    ['zinc', 'Zinc', 110, 7200, 380, 'design', TABLE, 'high'],
  ],
  plastic: [
    ['pvc', 'PVC, rigid', 0.17, 1390, 900, 'design', TABLE, 'high'],
    ['polycarbonate', 'Polycarbonate', 0.2, 1200, 1200, 'design', TABLE, 'high'],
    ['hdpe', 'Polyethylene, high density', 0.5, 980, 1800, 'design', TABLE, 'high'],
    ['epoxy', 'Epoxy resin', 0.2, 1200, 1400, 'design', TABLE, 'high'],
  ],
  roofing: [
    ['bitumen', 'Bitumen, pure', 0.17, 1050, 1000, 'design', TABLE, 'high'],
    ['asphalt', 'Asphalt', 0.7, 2100, 1000, 'design', TABLE, 'high'],
    ['clay-tile', 'Clay roof tile', 1, 2000, 800, 'design', TABLE, 'high'],
  ],
  floor: [
    ['linoleum', 'Linoleum', 0.17, 1200, 1400, 'design', TABLE, 'high'],
    ['carpet', 'Carpet / textile floor covering', 0.06, 200, 1300, 'design', TABLE, 'high'],
    ['rubber-floor', 'Rubber floor covering', 0.17, 1200, 1400, 'design', TABLE, 'high'],
    ['cork-tile', 'Cork tile', 0.065, 400, 1500, 'design', TABLE, 'high'],
    ['ceramic-tile', 'Ceramic / porcelain tile', 1.3, 2300, 840, 'design', TABLE, 'high'],
  ],
  ground: [
    [
      'soil-clay-silt',
      'Clay or silt',
      1.5,
      1500,
      2085,
      'moist',
      'ISO 10456 Table 3 (EN 12524 lineage), mid-range of 1200-1800 kg/m3 and 1670-2500 J/kgK',
      'medium',
    ],
    [
      'soil-sand-gravel',
      'Sand and gravel',
      2,
      1950,
      1045,
      'moist',
      'ISO 10456 Table 3 (EN 12524 lineage), mid-range of 1700-2200 and 910-1180',
      'medium',
    ],
    [
      'soil-iso13370-default',
      'Ground default (unknown)',
      2,
      2000,
      1000,
      'moist',
      'ISO 13370 default rho c = 2.0e6',
      'high',
    ],
    [
      'soil-iso13793-unfrozen',
      'Frost-susceptible soil, unfrozen',
      1.5,
      1350,
      2220,
      'moist',
      'ISO 13793 clause 5.1: dry density 1350, k 1.5, rho c 3.0e6; latent 150 MJ/m3 (properties from memory; dry-density range 1100-1600 confirmed in a public text)',
      'medium',
    ],
    [
      'soil-iso13793-frozen',
      'Frost-susceptible soil, frozen',
      2.5,
      1350,
      1410,
      'frozen',
      'ISO 13793 clause 5.1: k 2.5, rho c 1.9e6 (from memory)',
      'medium',
    ],
    ['soil-peat-saturated', 'Peat, saturated', 0.5, 1100, 3650, 'moist', HANDBOOK, 'low'],
    ['rock', 'Homogeneous rock', 3.5, 2500, 800, 'moist', 'ISO 13370 (k 3.5, rho c 2.0e6)', 'high'],
  ],
  water: [
    ['water-10c', 'Water at 10 degC (no convection)', 0.6, 1000, 4190, 'liquid', TABLE, 'high'],
    ['water-40c', 'Water at 40 degC (no convection)', 0.63, 990, 4190, 'liquid', TABLE, 'high'],
    ['ice-0c', 'Ice at 0 degC', 2.2, 900, 2000, 'solid', TABLE, 'high'],
    ['ice-m10c', 'Ice at -10 degC', 2.3, 920, 2000, 'solid', TABLE, 'high'],
    ['snow-fresh', 'Snow, fresh (< 30 mm)', 0.05, 100, 2000, 'solid', TABLE, 'high'],
    ['snow-compacted', 'Snow, slightly compacted (70-100 mm)', 0.23, 300, 2000, 'solid', TABLE, 'high'],
  ],
  gas: [
    ['air-still', 'Air (conduction only)', 0.025, 1.23, 1008, 'gas', TABLE, 'high'],
    ['argon', 'Argon', 0.017, 1.7, 519, 'gas', TABLE, 'high'],
  ],
  food: [
    ['food-lean-meat', 'Lean meat, unfrozen', 0.48, 1050, 3500, 'moist', HANDBOOK, 'low'],
    ['food-high-water', 'High-water food (fruit/vegetable)', 0.55, 1000, 3800, 'moist', HANDBOOK, 'low'],
  ],
  body: [['skin', 'Human skin, effective (passive, no perfusion)', 0.37, 1100, 3100, 'moist', HANDBOOK, 'low']],
}

/** The generic materials of the catalogue: nothing here is a product. */
export const genericMaterials: readonly Material[] = Object.entries(groups).flatMap(([group, rows]) =>
  rows.map(([id, name, conductivity, density, specificHeat, state, source, confidence]) => ({
    id,
    name,
    group,
    conductivity,
    density,
    specificHeat,
    state,
    source: `${source}, from memory`,
    confidence,
  })),
)

const byId = new Map(genericMaterials.map((material) => [material.id, material]))

export function genericMaterial(id: string): Material | undefined {
  return byId.get(id)
}
