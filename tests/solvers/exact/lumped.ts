import { D, PI } from './functions.ts'

/** What a cosine of amplitude 1 that is highest at an instant has done since time 0 to a body with one temperature; s = t/τ. */
export function exactCosine(t: D, s: D, period: D, instant: D): D {
  const W = PI.mul(2).div(period).mul(t).div(s)
  const size = W.mul(W).plus(1).sqrt()
  const turn = (time: D) => {
    const turns = time.minus(instant).div(period)
    return turns.minus(turns.floor()).mul(PI).mul(2)
  }
  const follow = (angle: D) => angle.cos().plus(W.mul(angle.sin())).div(size)
  return follow(turn(t))
    .minus(
      s
        .neg()
        .exp()
        .mul(follow(turn(new D(0)))),
    )
    .div(size)
}
