/** The demo range as the advisor reads it: the same shape and values that features/catalogue/read.ts makes of the seeded tables. */
import type { Wheelset } from '#contract/catalogue.ts'
import type { WheelFacts, WheelsetFacts } from '#core/catalogue.ts'
import { designDigest } from '../wheel-designs/solve.ts'
import { catalogue, type SeedWheelset } from './catalogue.ts'
import { solvedWheels } from './solved-wheels.ts'
import { texts } from './texts.ts'

export const limitProof = ({ id }: SeedWheelset) =>
  `Invented demo proof: bench report FB-${4100 + id}, front and rear wheel, static side load and fatigue drum.`

export const wheelsetFacts: (Wheelset & WheelsetFacts)[] = catalogue
  .map((w) => {
    const { sku, slug, name, brake, beadSeatMm, rides, useCondition, assistRated, buildKind, limitKg } = w
    const [front, rear] = [wheelFacts(w, 'front'), wheelFacts(w, 'rear')]
    const [tagline, description] = texts[sku]?.en ?? ['', '']
    return {
      ...{
        sku,
        slug,
        name,
        tagline,
        description,
        brake,
        beadSeatMm,
        rides,
        useCondition,
        assistRated,
        buildKind,
        limitKg,
      },
      limitProof: limitProof(w),
      massG: front.massG + rear.massG,
      prices: w.priceCents,
      available: w.onHand,
      front,
      rear,
    }
  })
  .sort((a, b) => (a.slug < b.slug ? -1 : 1))

function wheelFacts({ sku, wheels }: SeedWheelset, position: 'front' | 'rear'): Wheelset['front'] & WheelFacts {
  const wheel = wheels.find((one) => one.position === position)
  if (!wheel) throw new Error(`${sku} has no ${position} wheel`)
  const { rim, hub, spoke, spokeCount, crossesLeft, crossesRight, tensionTightN, massG } = wheel
  const { material, depthMm, innerWidthMm, outerWidthMm, seat, maxPressureBar, tyreMinMm, tyreMaxMm } = rim
  const { axles, freehubs, rotorMount, pcdLeftMm, pcdRightMm, flangeLeftMm, flangeRightMm, maxAxleLoadKg } = hub
  return {
    ...{
      position,
      rimName: rim.name,
      hubName: hub.name,
      spokeName: spoke.name,
      material,
      depthMm,
      innerWidthMm,
      outerWidthMm,
    },
    ...{ seat, maxPressureBar, tyreMinMm, tyreMaxMm, spokeCount, crossesLeft, crossesRight, tensionTightN },
    ...{ pcdLeftMm, pcdRightMm, flangeLeftMm, flangeRightMm, axles, freehubs, rotorMount, massG },
    ...{ maxAxleLoadKg, strength: solvedWheels.designs[designDigest(wheel)]?.strength ?? null },
  }
}
