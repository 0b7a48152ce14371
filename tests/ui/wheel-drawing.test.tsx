/** The drawings are held to outside lengths (wheel reference 4.9, checked there by point distance) and to what must hold for any wheel. */
import { render, screen } from '@testing-library/react'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { PairDrawing } from '../../src/ui/PairDrawing.tsx'
import { RimSection } from '../../src/ui/RimSection.tsx'
import { WheelDrawing } from '../../src/ui/WheelDrawing.tsx'
import {
  onCircle,
  RIM_EDGE_MM,
  rimSection,
  spokeLengthMm,
  spokeLines,
  tyreCircle,
  wheelRadii,
} from '../../src/ui/wheel-geometry.ts'

const rowan = {
  ...{ beadSeatMm: 622, tyreWidthMm: 28, depthMm: 45, spokeCount: 24, crossesLeft: 2, crossesRight: 2 },
  ...{ pcdLeftMm: 58, pcdRightMm: 54, flangeLeftMm: 34, flangeRightMm: 19 },
}

/** Wheel reference 4.9: nipple-seat diameter, PCD, flange, spokes, crosses, centre to centre; all mm. */
const lengths: [string, number, number, number, number, number, number][] = [
  ['front', 602, 38, 36, 36, 3, 294.18],
  ['rear left', 602, 44, 37, 36, 3, 292.97],
  ['rear right', 602, 50, 17.5, 36, 3, 289.84],
  ['front disc left', 548, 58, 23.5, 24, 2, 261.77],
  ['front disc right', 548, 52, 34, 24, 2, 264.17],
  ['rear disc left', 548, 58, 34, 24, 2, 262.92],
  ['rear disc right', 548, 54, 19, 24, 2, 262.24],
  ['front radial, 20', 518, 38, 36, 20, 0, 242.68],
  ['front radial, 16', 508, 38, 36, 16, 0, 237.74],
  ['cross-country rear left', 586, 58, 35, 28, 3, 290.06],
  ['cross-country rear right', 586, 56, 21, 28, 3, 288.83],
  ['cross-country front left', 586, 58, 27, 32, 3, 284.46],
]

describe('spokeLines', () => {
  it.each(lengths)(
    '%s: every spoke as long as the reference says',
    (_, seatMm, pcdMm, flangeMm, spokeCount, crosses, expected) => {
      const wheel = {
        ...{ ...rowan, spokeCount, crossesLeft: crosses, crossesRight: crosses },
        ...{ pcdLeftMm: pcdMm, pcdRightMm: pcdMm, flangeLeftMm: flangeMm, flangeRightMm: flangeMm },
      }
      for (const spoke of spokeLines(wheel, seatMm))
        expect(Math.abs(spokeLengthMm(spoke) - expected)).toBeLessThan(0.0051)
    },
  )

  it('hangs half of the spokes on either flange, at its own pitch circle and width', () => {
    const spokes = spokeLines(rowan)
    expect(spokes).toHaveLength(24)
    expect(spokes.filter(({ side }) => side === 'left')).toHaveLength(12)
    for (const { side, hub } of spokes) {
      expect(Math.hypot(hub.x, hub.y)).toBeCloseTo(side === 'left' ? 29 : 27, 9)
      expect(hub.z).toBe(side === 'left' ? -34 : 19)
    }
  })

  it('gives each hole of a flange to one spoke only, whatever the count and the crosses', () => {
    const builds = fc.constantFrom(
      [16, 0],
      [16, 1],
      [20, 0],
      [20, 2],
      [24, 0],
      [24, 2],
      [28, 2],
      [28, 3],
      [32, 3],
      [36, 3],
    )
    fc.assert(
      fc.property(builds, ([spokeCount = 24, crosses = 2]) => {
        const spokes = spokeLines({ ...rowan, spokeCount, crossesLeft: crosses, crossesRight: crosses })
        const holes = new Set(
          spokes.map(({ hub }) => `${hub.x.toFixed(4)} ${hub.y.toFixed(4)} ${hub.z}`.replaceAll('-0.0000', '0.0000')),
        )
        expect(holes.size).toBe(spokeCount)
      }),
    )
  })

  it('draws radial spokes straight out from the axle', () => {
    for (const { hub, rim } of spokeLines({ ...rowan, crossesLeft: 0, crossesRight: 0 }))
      expect(hub.x * rim.y - hub.y * rim.x).toBeCloseTo(0, 6)
  })
})

describe('wheelRadii', () => {
  it('keeps the bead seat of the standard and the depth of the rim', () => {
    const { beadSeat, tyreOuter, rimOuter, rimInner } = wheelRadii(rowan)
    expect(beadSeat).toBe(311) // ISO 5775: 622 mm across
    expect(tyreOuter - beadSeat).toBe(28)
    expect(rimOuter - beadSeat).toBe(RIM_EDGE_MM)
    expect(rimOuter - rimInner).toBe(45)
  })
  // wheel reference 3.1: nipple-seat diameters 573, 543 and 513 mm for carbon 30, 45 and 60
  it.each([
    [30, 573],
    [45, 543],
    [60, 513],
  ])('puts the spokes of a %d mm rim where the reference has them', (depthMm, seatMm) => {
    expect(2 * wheelRadii({ ...rowan, depthMm }).rimInner).toBeCloseTo(seatMm, 6)
  })
})

describe('rimSection and tyreCircle', () => {
  it.each(['hooked', 'hookless'] as const)('keeps the widths of a %s rim', (seat) => {
    const section = rimSection({ depthMm: 45, outerWidthMm: 28, innerWidthMm: 21, seat })
    expect(section.outer * 2).toBe(28)
    expect(Math.min(...section.bead.map(({ x }) => x)) * 2).toBe(21)
    // only a hook is narrower at its tip than below it
    expect(section.bead.some(({ x }) => x > section.inner)).toBe(seat === 'hooked')
  })
  it('leaves a hollow inside every rim of the trade', () => {
    fc.assert(
      fc.property(fc.integer({ min: 18, max: 90 }), fc.integer({ min: 20, max: 36 }), (depthMm, outerWidthMm) => {
        const { hollow, shoulder } = rimSection({
          depthMm,
          outerWidthMm,
          innerWidthMm: outerWidthMm - 6,
          seat: 'hooked',
        })
        expect(hollow.bottom).toBeGreaterThan(hollow.top)
        expect(shoulder).toBeLessThan(depthMm)
      }),
    )
  })
  it('draws a tyre as wide as it is and through both bead walls', () => {
    const { radius, half, centreY } = tyreCircle(32, 21)
    expect(radius * 2).toBe(32)
    expect(Math.hypot(half, centreY)).toBeCloseTo(radius, 9)
    expect(half * 2).toBe(21)
  })
})

describe('the drawings', () => {
  const lines = (side: string) => document.querySelectorAll(`[data-side=${side}] line`).length

  it('WheelDrawing says what it shows and has a line for each spoke', () => {
    render(<WheelDrawing wheel={rowan} label="Rear wheel" dimension="45 mm" />)
    expect(screen.getByRole('img', { name: 'Rear wheel' }).textContent).toContain('45 mm')
    expect([lines('left'), lines('right')]).toEqual([12, 12])
  })
  it('WheelDrawing without a label is left out for screen readers', () => {
    render(<WheelDrawing wheel={rowan} label="" size="card" />)
    expect(screen.queryByRole('img')).toBeNull()
  })
  it('PairDrawing draws both wheels and never shares an id with another one', () => {
    const pair = <PairDrawing front={{ ...rowan, spokeCount: 20 }} rear={rowan} label="Both wheels" />
    render(
      <>
        {pair}
        {pair}
      </>,
    )
    expect(screen.getAllByRole('img', { name: 'Both wheels' })).toHaveLength(2)
    expect(lines('left')).toBe(2 * (10 + 12))
    const ids = [...document.querySelectorAll('[id]')].map(({ id }) => id)
    expect(new Set(ids).size).toBe(ids.length)
  })
  it('RimSection carries its dimensions as given', () => {
    const rim = { depthMm: 45, outerWidthMm: 28, innerWidthMm: 21, seat: 'hooked' } as const
    render(
      <RimSection
        rim={rim}
        tyres={[28, 47]}
        label="Section"
        texts={{ depth: '45 mm', outer: '28 mm', inner: '21 mm' }}
      />,
    )
    const drawn = screen.getByRole('img', { name: 'Section' }).textContent
    for (const text of ['45 mm', '28 mm', '21 mm']) expect(drawn).toContain(text)
  })
  it('puts angle zero at the top', () => {
    expect(onCircle(10, 0)).toEqual({ x: 0, y: -10, z: 0 })
  })
})
