import { MINUS, THIN, timesTen } from '../figure/measures.ts'

/** A whole number in groups of three. */
export function whole(value: number): string {
  return String(Math.round(value))
    .replace(/\B(?=(\d{3})+$)/g, THIN)
    .replace('-', MINUS)
}

/** A number with a power of ten set as one. */
export function scientific(value: number, digits = 2): string {
  if (value === 0) return '0'
  const [mantissa, exponent] = value.toExponential(digits - 1).split('e') as [string, string]
  return timesTen(mantissa, Number(exponent))
}

const superscripts: Record<string, string> = { 2: '²', 3: '³', 4: '⁴' }

const byHand = [
  ['Cel', '°C'],
  ['um', 'µm'],
  ['[degF]', '°F'],
  ['[degR]', '°R'],
  ['[in_i]', 'in'],
  ['[ft_i]', 'ft'],
  ['[yd_i]', 'yd'],
  ['[lb_av]', 'lb'],
  ['[Btu_IT]', 'Btu'],
  ['kcal_IT', 'kcal'],
] as const

/** A unit code as it is written by hand. */
export function unitText(ucum: string): string {
  if (ucum === '1') return ''
  return byHand
    .reduce((text, [code, said]) => text.replaceAll(code, said), ucum)
    .replaceAll('.', '·')
    .replace(/[234]/g, (d) => superscripts[d] ?? d)
}

const day = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', timeZone: 'UTC' })
const clock = new Intl.DateTimeFormat('en-GB', {
  hour: '2-digit',
  minute: '2-digit',
  second: '2-digit',
  hourCycle: 'h23',
  timeZone: 'UTC',
})

/** "21 Nov", in UTC. */
export const dayText = (iso: string): string => day.format(new Date(iso))

/** "21 Nov 09:40:12", in UTC. */
export const instantText = (iso: string): string => `${day.format(new Date(iso))} ${clock.format(new Date(iso))}`

export const counted = (n: number, one: string, many = `${one}s`): string => `${whole(n)} ${n === 1 ? one : many}`
