import type { ReactNode } from 'react'
import { Drawing } from '../figure/drawing.tsx'
import { hatched } from '../figure/hatches.tsx'

const Frame = ({ children }: { children: ReactNode }) => (
  <Drawing width={150} height={85} viewBox="22 2 150 100">
    {children}
  </Drawing>
)

export const EmptyBody = () => (
  <Frame>
    <path className="dash" d="M30 14H154V90H30Z" />
    <path className="dim" d="M24 96L36 84M148 96L160 84" />
  </Frame>
)

export const FillingBody = () => (
  <Frame>
    <rect className="thin" x="30" y="14" width="124" height="76" />
    <rect fill={hatched('masonry')} x="30" y="14" width="52" height="76" />
    <path className="now" d="M82 8V96" />
  </Frame>
)

export const BrokenBody = () => (
  <Frame>
    {['M30 14H86L96 40L82 56L94 90H30Z', 'M104 14H154V90H112L100 56L114 40Z'].map((d) => (
      <g key={d}>
        <path fill={hatched('masonry')} d={d} />
        <path className="out" d={d} />
      </g>
    ))}
  </Frame>
)

export const PartedBodies = () => (
  <Frame>
    <rect fill={hatched('masonry')} x="30" y="14" width="46" height="76" />
    <path className="cut" d="M76 10V94" />
    <path className="out" d="M30 14H76M30 90H76" />
    <path className="dash" d="M108 14H154V90H108Z" />
    <path className="chain" d="M80 52H104" />
  </Frame>
)

export const ClosedBody = () => (
  <Frame>
    <rect fill={hatched('masonry')} x="30" y="14" width="62" height="76" />
    <path className="out" d="M92 14H30V90H92" />
    <path className="chain" d="M92 4V100" />
    <path className="chain-end" d="M92 4v12M92 88v12" />
  </Frame>
)
