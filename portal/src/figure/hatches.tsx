import type { ReactNode } from 'react'

const line = (d: string) => <path className="hatch-line" d={d} />
const dot = (cx: number, cy: number, r = 1) => <circle className="hatch-dot" cx={cx} cy={cy} r={r} />

interface Tile {
  width: number
  height: number
  drawn: ReactNode
}

const tile = (width: number, height: number, drawn: ReactNode): Tile => ({ width, height, drawn })

/** One hatch per family of material; the last four tell series apart. */
const tiles = {
  masonry: tile(8, 8, line('M-2 2L2-2M-2 10L10-2M6 10L10 6')),
  concrete: tile(
    34,
    34,
    <>
      {line('M5 6l6 1-4 5zM22 20l7 2-5 5z')}
      {dot(20, 6)}
      {dot(29, 11)}
      {dot(7, 22)}
      {dot(13, 30)}
      {dot(16, 16)}
      {dot(31, 31)}
    </>,
  ),
  stone: tile(20, 14, line('M0 14L6 6M9 2L10 0M10 14L16 6M19 2L20 0')),
  plaster: tile(
    7,
    7,
    <>
      {dot(1.5, 1.5, 0.9)}
      {dot(5, 5, 0.9)}
    </>,
  ),
  wool: tile(24, 24, line('M0 0C14 2 14 10 4 12C-6 14 10 22 24 24M24 0C10 2 10 10 20 12C30 14 14 22 0 24')),
  metal: tile(10, 10, line('M-2 2L2-2M-2 12L12-2M8 12L12 8M-2 15L15-2M-2 5L5-2')),
  ground: tile(28, 20, line('M2 8L9 1M6 9L13 2M10 10L17 3M18 18L11 18M20 20L27 13')),
  ice: tile(22, 10, line('M1 3H12M12 8H21')),
  level: tile(6, 6, line('M0 3H6')),
  upright: tile(6, 6, line('M3 0V6')),
  cross: tile(8, 8, line('M0 4H8M4 0V8')),
  back: tile(8, 8, line('M-2 6L2 10M-2 -2L10 10M6-2L10 2')),
}

export type Hatch = keyof typeof tiles

export const hatched = (name: Hatch): string => `url(#hatch-${name})`

/** The patterns, once in a document; every drawing refers to them. */
export function Hatches() {
  return (
    <svg width="0" height="0" className="absolute" aria-hidden="true">
      <defs>
        {Object.entries(tiles).map(([name, { width, height, drawn }]) => (
          <pattern key={name} id={`hatch-${name}`} width={width} height={height} patternUnits="userSpaceOnUse">
            {drawn}
          </pattern>
        ))}
      </defs>
    </svg>
  )
}
