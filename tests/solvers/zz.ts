import { D } from './exact/functions.ts'
import { exactSlab } from './exact/film.ts'
import { solve } from '../../solvers/cases/slab-convection/solve.ts'
const rnd = (lo: number, hi: number) => {
  const v = 10 ** (Math.log10(lo) + Math.random() * Math.log10(hi / lo))
  return new D(v)
    .mul(1 + 1e-12 * Math.random())
    .plus(new D(Math.random()).mul(v).mul(1e-16))
    .toSignificantDigits(20)
}
const n = Number(process.argv[2] ?? 400)
const worst: any = {},
  ratios: any = {}
const t0 = Date.now()
for (let i = 0; i < n; i++) {
  const k = rnd(0.01, 100),
    rho = rnd(10, 5e3),
    c = rnd(100, 5e3),
    d = rnd(1e-3, 10)
  const B = rnd(1e-14, 1e17),
    Fo = Math.random() < 0.5 ? rnd(1e-3, 1) : rnd(1e-9, 1e4)
  const faces: 1 | 2 = Math.random() < 0.5 ? 1 : 2
  const L = d.div(faces)
  const h = B.mul(k).div(L).toSignificantDigits(20),
    t = Fo.mul(L.mul(L)).mul(rho.mul(c)).div(k).toSignificantDigits(20)
  let x = L.mul(Math.random() < 0.15 ? 0 : Math.random() < 0.15 ? 1 : Math.random()).toSignificantDigits(20)
  if (x.gt(L)) x = L
  const Ti = new D(Math.random() * 100 - 50),
    Ta = new D(Math.random() * 100 - 50)
  const a = k.div(rho.mul(c))
  const e = exactSlab(h.mul(L).div(k), a.mul(t).div(L.mul(L)), x.div(L))
  const N = (v: any) => Number(v.toString())
  const rc = N(rho) * N(c)
  const outs = [
    'temperature',
    'heatFlux',
    'surfaceHeatFlux',
    'heatGained',
    'meanTemperature',
    'remainingFraction',
    'completedFraction',
    'heatFraction',
  ] as const
  const s = solve({
    conductivity: N(k),
    volumetricHeatCapacity: rc,
    diffusivity: N(k) / rc,
    thickness: N(d),
    exposedFaces: faces,
    filmCoefficient: N(h),
    initialTemperature: N(Ti),
    ambientTemperature: N(Ta),
    depths: [N(x)],
    times: [N(t)],
    outputs: [...outs],
  })
  const dT = Ta.minus(Ti)
  const face = exactSlab(h.mul(L).div(k), a.mul(t).div(L.mul(L)), new D(0))
  const ex: any = {
    temperature: Ti.plus(dT.mul(e.completed)),
    heatFlux: h.mul(dT).mul(e.flux),
    surfaceHeatFlux: h.mul(dT).mul(face.remaining),
    heatGained: rho.mul(c).mul(L).mul(dT).mul(e.heat),
    meanTemperature: Ta.minus(dT.mul(e.mean)),
    remainingFraction: e.remaining,
    completedFraction: e.completed,
    heatFraction: e.heat,
  }
  for (const o of outs) {
    const out: any = s.outputs[o]
    const v = Array.isArray(out.values[0]) ? out.values[0][0] : out.values[0]
    const err = Number(new D(v).minus(ex[o]).abs())
    const b = out.bound.absolute + out.bound.relative * Math.abs(v)
    const r = err / b
    ;(ratios[o] ??= []).push(b / Math.max(err, 1e-400))
    const rel = b / Math.abs(Number(ex[o]))
    if (!worst[o] || r > worst[o].r)
      worst[o] = { r, B: N(B), Fo: N(Fo), X: Number(x.div(L)), v, b, err, m: s.methods.join() }
    if (
      o !== 'temperature' &&
      o !== 'meanTemperature' &&
      o !== 'heatFlux' &&
      (!worst[o].rel || rel > worst[o].rel) &&
      Math.abs(v) > 1e-280
    ) {
      worst[o].rel = rel
      worst[o].relat = [N(B), N(Fo), Number(x.div(L))]
    }
  }
}
console.log(Date.now() - t0, 'ms')
for (const o in worst) {
  const q = ratios[o].filter((x: number) => isFinite(x)).sort((a: number, b: number) => a - b)
  console.log(
    o,
    'max true/bound',
    worst[o].r.toFixed(3),
    'median bound/true',
    q[q.length >> 1].toFixed(1),
    JSON.stringify(worst[o]),
  )
}
