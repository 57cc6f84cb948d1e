import { describe, expect, test } from 'vitest'
import { caseOf } from '../ask.ts'
import { askOperation, prepared, refusalOf } from './ask-operation.ts'

interface Chart {
  series: { label: string; x: number[]; y: number[] }[]
  lengthUsed: number | null
  svg: string
}
const chart = (caseId: string, body: Record<string, unknown>) => askOperation<Chart>('chart', caseId, body)
const profiles = (input: object) => ({ kind: 'profiles', input })
const histories = (input: object) => ({ kind: 'histories', input })
const { times, depths: _, ...slab } = caseOf('slab-convection').example

/** Every tag is closed, and no curve leaves the paper. */
function expectDrawing(svg: string, curves: number, width = 720, height = 480): void {
  expect(svg).toMatch(
    /^<svg xmlns="http:\/\/www.w3.org\/2000\/svg"[^>]* role="img" aria-labelledby="[^"]+"[^>]*>\n<title id="/,
  )
  expect(svg).toMatch(/<desc id="[^"]+">[^<]+<\/desc>/)
  const open: string[] = []
  for (const [, close, name, self] of svg.matchAll(/<(\/?)(\w+)[^>]*?(\/?)>/g)) {
    if (close) expect(open.pop()).toBe(name)
    else if (!self) open.push(name!)
  }
  expect(open).toEqual([])
  expect(svg).not.toMatch(/NaN|Infinity|undefined/)
  const paths = [...svg.matchAll(/<path d="([^"]*)"/g)].map(([, d]) => d!)
  expect(paths).toHaveLength(curves)
  for (const path of paths) {
    const numbers = path.match(/-?[\d.]+/g)!.map(Number)
    expect(numbers.length).toBeGreaterThan(50)
    numbers.forEach((v, i) => {
      expect(v).toBeGreaterThanOrEqual(-1)
      expect(v).toBeLessThanOrEqual(i % 2 === 0 ? width : height)
    })
  }
}

test('profiles run from face to face, one for each time', () => {
  const { result, points, units } = chart('slab-convection', { ...profiles({ ...slab, times }), points: 60 })
  expect(result.series.map(({ label }) => label)).toEqual(['3600 s', '36000 s'])
  expect(result.series[0]!.x).toHaveLength(60)
  expect([result.series[0]!.x[0], result.series[0]!.x[59]]).toEqual([0, 0.1])
  expect(result.series[0]!.y[0]).toBeCloseTo(13.7751886477336, 12)
  expect(result.series[1]!.y[59]).toBeCloseTo(2.4362336338823, 12)
  expect(result.lengthUsed).toBe(0.1)
  expect(units).toEqual({ x: 'm', y: 'Cel' })
  expect(points).toBe(2 * 60 + 50)
  expectDrawing(result.svg, 2)
})

test('histories run over time, one for each place', () => {
  const asked = { ...histories({ ...slab, depths: [0, 0.1] }), until: 36000, width: 400, height: 300 }
  const { result } = chart('slab-convection', asked)
  expect(result.series.map(({ label }) => label)).toEqual(['0 m', '0.1 m'])
  expect(result.series.map(({ y }) => y[0])).toEqual([20, 20])
  expect(result.series[1]!.y.at(-1)).toBeCloseTo(2.4362336338823, 12)
  expectDrawing(result.svg, 2, 400, 300)
  const log = chart('slab-convection', { ...asked, logTime: true }).result.series[0]!.x
  expect(log[1]! / log[0]!).toBeCloseTo(log[99]! / log[98]!, 10)
})

test('a half space is drawn as deep as the change has come', () => {
  const { times: all, depths: __, ...ground } = caseOf('semi-infinite-surface-temperature').example
  const { result } = chart('semi-infinite-surface-temperature', profiles({ ...ground, times: all }))
  expect(result.series[1]!.x.at(-1)).toBeCloseTo(3.642772 * Math.sqrt(6.25e-7 * 3888000), 10)
  expect(result.lengthUsed).toBeNull()
  expectDrawing(result.svg, 2)
})

describe('the classic charts', () => {
  const at = (kind: string, asked: object) => chart('slab-convection', { kind, ...asked })

  test('are drawn from exact values', () => {
    const { result, accuracy } = at('dimensionless-centre', { biotValues: [1], from: 1, until: 2 })
    expect(result.series[0]!.y[0]).toBeCloseTo(0.5338594014, 10)
    expect(result.lengthUsed).toBe(1)
    expect(accuracy.bound['y']!.absolute + accuracy.bound['y']!.relative).toBeLessThan(1e-12)
    expectDrawing(result.svg, 1)
    expectDrawing(at('dimensionless-centre', {}).result.svg, 6)
    const heat = at('heat-fraction', { biotValues: [1], from: 1, until: 10 }).result
    expect(heat.series[0]!.y[0]).toBeGreaterThan(0.4)
    expectDrawing(at('heat-fraction', {}).result.svg, 6)
  })

  test('say what a correction by position errs by, and where it may be used', () => {
    const { result, accuracy } = at('position-correction', { biotValues: [1] })
    const { x, y } = result.series[0]!
    expect([x[0], x.at(-1), y[0]]).toEqual([0, 1, 1])
    expect(y.at(-1)).toBeCloseTo(0.6521846, 7)
    const sentence = (accuracy as unknown as { error: string }).error
    expect(sentence).toContain('Fourier numbers of 0.2 and more only')
    expect(sentence).toContain('5.5 % (Bi 3.2)')
    expect(result.svg).toContain('5.5 % (Bi 3.2)')
    // The true ratio at Fo 0.2 is 0.6768, and its difference stands within the bound.
    expect(0.6768 / y.at(-1)! - 1).toBeLessThan(accuracy.bound['y']!.relative)
    expectDrawing(result.svg, 1)
  })

  test('are drawn for cylinders and spheres, each with its own error', () => {
    for (const id of ['cylinder-convection', 'sphere-convection']) {
      const { result, accuracy } = chart(id, { kind: 'position-correction' })
      expect((accuracy as unknown as { error: string }).error).toMatch(/errs by at most \d/)
      expectDrawing(result.svg, 6)
    }
  })
})

test('a bar has a width of its own, beside that of the drawing', () => {
  const { times: _, points: places, ...bar } = caseOf('bar-rectangular').example
  const { result, input } = chart('bar-rectangular', {
    ...histories({ ...bar, points: places }),
    until: 3600,
    width: 500,
  })
  expect(result.series).toHaveLength((places as unknown[]).length)
  expect(result.svg).toContain('width="500"')
  expect(input).toMatchObject({ width: 500, input: { width: bar['width'] } })
})

test('texts of a caller do no harm', () => {
  const title = '<script>alert("a") & \u0000b</script>'
  const { result } = chart('slab-convection', { ...profiles({ ...slab, times }), title })
  expect(result.svg).toContain('&lt;script&gt;alert(&quot;a&quot;) &amp;  b&lt;/script&gt;')
  expect(result.svg).not.toContain('<script')
})

describe('a call that makes no sense', () => {
  const bare = { ...slab, thickness: undefined }
  test.each([
    ['a kind that the case has not', 'lumped-convection', { kind: 'profiles' }, '#/kind', 'not-in-list'],
    [
      'places of profiles',
      'slab-convection',
      profiles({ ...slab, times, depths: [0] }),
      '#/input/depths',
      'conflicting-fields',
    ],
    ['no times of profiles', 'slab-convection', profiles(slab), '#/input/times', 'missing-field'],
    [
      'times of histories',
      'slab-convection',
      histories({ ...slab, times, depths: [0] }),
      '#/input/times',
      'conflicting-fields',
    ],
    ['no end of histories', 'slab-convection', histories({ ...slab, depths: [0] }), '#/until', 'missing-field'],
    ['no places of histories', 'slab-convection', { ...histories(slab), until: 9 }, '#/input/depths', 'missing-field'],
    [
      'a body of every body',
      'slab-convection',
      { kind: 'heat-fraction', input: slab },
      '#/input/conductivity',
      'conflicting-fields',
    ],
    ['a span that is none', 'slab-convection', { kind: 'heat-fraction', from: 5, until: 2 }, '#/until', 'out-of-range'],
    [
      'a place beyond the face',
      'slab-convection',
      { kind: 'position-correction', until: 2 },
      '#/until',
      'out-of-range',
    ],
    [
      'too many curves',
      'slab-convection',
      profiles({ ...slab, times: [1, 2, 3, 4, 5, 6, 7, 8, 9] }),
      '#/input/times',
      'wrong-length',
    ],
    ['too few points', 'slab-convection', { kind: 'heat-fraction', points: 10 }, '#/points', 'out-of-range'],
    ['a missing thickness', 'slab-convection', profiles({ ...bare, times }), '#/input/thickness', 'missing-field'],
    [
      'a profile that leaves the body',
      'slab-convection',
      { ...profiles({ ...slab, times }), until: 0.5 },
      '#/until',
      'depth-outside-body',
    ],
  ])('is refused: %s', (_, id, body, pointer, code) => {
    const issues = refusalOf('chart', id, body)
    expect(issues.map((issue) => `${issue.pointer} ${issue.code}`)).toContain(`${pointer} ${code}`)
  })

  test('is priced by its points before it is drawn', () => {
    expect(prepared('chart', 'slab-convection', { kind: 'heat-fraction', biotValues: [1, 2], points: 50 }).points).toBe(
      150,
    )
  })
})
