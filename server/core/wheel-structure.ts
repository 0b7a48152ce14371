/**
 * What one wheel design carries: a finite-element model of rim and pre-tensioned spokes, linear up to the first slack spoke. Solved once for each
 * design, when it is saved; a rider check is then a few divisions (rider-limits.ts). Forces in N, lengths in m unless named.
 * @source wheel reference 2 (DERIVED); checked there against an independent finite-element program and here against the cases of that file
 */
import { Matrix, solve } from 'ml-matrix'
import {
  bracingDeg,
  checkDesign,
  spokeLines,
  tensionRatio,
  tensionsFromAverage,
  tensionsFromTight,
  type WheelDesign,
} from './wheel-geometry.ts'
import {
  assemble,
  bucklingScale,
  displacement,
  factor,
  LATERAL,
  PER_NODE,
  RADIAL,
  respond,
  TANGENTIAL,
  type Factors,
  type Response,
  type Ring,
} from './wheel-rings.ts'
import { bucklingSeries, rimCompressionN } from './wheel-series.ts'
import { spokeElement, spokePull } from './wheel-stiffness.ts'

/** Rim elements for each spoke gap: two are within 0.2 % of six for stiffness and shares, 0.6 % for buckling. */
export const PER_GAP = 2
/** Contact radius at which a driving or braking force acts, m. */
export const ROLLING_RADIUS_M = 0.336

/** Radial and tangential parts of the system weight at one wheel, in the hardest moment taken (0.5 g disc stop in front, standing climb behind). */
export const TORQUE_CASE = {
  front: { radial: 0.95, tangential: 0.5 },
  rear: { radial: 0.75, tangential: 0.35 },
} as const

export interface Spread {
  mean: number
  least: number
  greatest: number
}

export interface BrokenSpoke {
  /** Sideways shift of the rim at the hole, and greatest less least over the rim. */
  shiftMm: number
  runOutMm: number
  leastTensionN: number
}

/** Stored with the design. Everything holds at the stated tension. */
export interface WheelStructure {
  tensionN: { left: number; right: number; average: number }
  tensionRatio: number
  spokeLengthMm: { left: number; right: number }
  bracingDeg: { left: number; right: number }
  rimCompressionN: number
  /** Stiffness at the rim over the positions of one repeat of the lacing, N/mm. */
  radialNPerMm: Spread
  lateralNPerMm: Spread
  tangentialNPerMm: Spread
  /** Tension lost by the most unloaded spoke, and gained by the most loaded, for each newton of radial load. */
  share: number
  gain: number
  /** Change of tension of every spoke for each newton of inward load at a left and at a right spoke. */
  profile: { underLeft: number[]; underRight: number[] }
  firstSlackN: number
  firstSlackSide: 'left' | 'right' | 'either'
  lateralFirstSlackN: number
  /** Range of tension that a spoke sees in one turn, for each newton. */
  rangePerN: { left: number; right: number }
  /** System weight at which a first spoke goes slack in the torque case, N. */
  torqueWeightN: { front: number; rear: number }
  brokenSpoke: { left: BrokenSpoke; right: BrokenSpoke }
  bucklingTensionN: number
}

/** The wheel cannot hold this tension: it buckles sideways below it. An answer about the design, not a numeric fault. */
export class TensionBuckles extends RangeError {
  readonly tensionN: number
  constructor(tensionN: number) {
    super(`the wheel buckles sideways below a mean spoke tension of ${Math.round(tensionN)} N`)
    this.tensionN = tensionN
  }
}

export interface Solved {
  structure: WheelStructure
  /** For further questions about the same wheel. */
  inner: Inner
}
export interface Inner {
  design: WheelDesign
  lines: ReturnType<typeof spokeLines>
  tensions: [number, number, number, number]
  ring: Ring
  factors: Factors
  pulls: number[][]
  /** Fields for a pull along each of the four spokes, then for unit loads; columnOf finds the column of an unknown. */
  response: Response
  columnOf: Map<number, number>
}

const sides = ['left', 'right'] as const

/**
 * Solves one wheel at a mean or at a tight-side tension.
 * @param tension averageN of all spokes, or tightN of the tighter side; 100 to 2000 N
 * @throws RangeError naming the field that is out of range; TensionBuckles where the wheel cannot hold the tension
 */
export function solveWheel(
  design: WheelDesign,
  tension: { averageN: number } | { tightN: number },
  perGap = PER_GAP,
): Solved {
  checkDesign(design)
  const given = 'averageN' in tension ? tension.averageN : tension.tightN
  if (!(given > 0 && given < 5000)) throw new RangeError('tension must be more than 0 and less than 5000 N')
  const { spokeCount, spokeEaN, centroidRadiusM } = design
  const lines = spokeLines(design)
  const ratio = tensionRatio(lines)
  const { leftN, rightN, averageN } =
    'averageN' in tension ? tensionsFromAverage(ratio, tension.averageN) : tensionsFromTight(ratio, tension.tightN)
  const tensions: Inner['tensions'] = [leftN, rightN, leftN, rightN]
  const section = {
    eaN: design.rimEaN,
    eiRadial: design.rimEiRadialNm2,
    eiLateral: design.rimEiLateralNm2,
    gj: design.rimGjNm2,
  }
  const repeats = spokeCount / 4
  const ring = assemble(section, centroidRadiusM, lines, spokeEaN, tensions, repeats, perGap)
  const factors = factor(ring)
  if (!factors) throw new TensionBuckles(averageN)

  const nodes = 4 * perGap
  const pulls = lines.map((line) => spokePull(line).map((part) => (part * spokeEaN) / line.lengthM))
  // One solution for all questions: a pull along each spoke, then a unit load on every unknown that is asked about below.
  const units = unitLoads(nodes, perGap)
  const loads = Matrix.zeros(ring.size, lines.length + units.length)
  pulls.forEach((pull, spoke) => {
    pull.forEach((part, i) => {
      loads.set(spoke * perGap * PER_NODE + i, spoke, part)
    })
  })
  units.forEach((unknown, i) => {
    loads.set(unknown, lines.length + i, 1)
  })
  const response = respond(factors, loads)
  const columnOf = new Map(units.map((unknown, i) => [unknown, lines.length + i]))
  const inner: Inner = { design, lines, tensions, ring, factors, pulls, response, columnOf }

  const spread = (values: readonly number[]): Spread => ({
    mean: values.reduce((sum, value) => sum + value, 0) / values.length,
    least: Math.min(...values),
    greatest: Math.max(...values),
  })

  const found = overPositions(inner)
  const closed = bucklingSeries(design, lines, tensions)
  const scale = bucklingScale(ring, Number.isFinite(closed.scale) ? closed.scale * 0.97 : 5)
  return {
    inner,
    structure: {
      tensionN: { left: leftN, right: rightN, average: averageN },
      tensionRatio: ratio,
      spokeLengthMm: { left: lines[0].lengthM * 1000, right: lines[1].lengthM * 1000 },
      bracingDeg: { left: bracingDeg(lines[0]), right: bracingDeg(lines[1]) },
      rimCompressionN: rimCompressionN(spokeCount, lines, tensions),
      radialNPerMm: spread(pointStiffness(inner, RADIAL)),
      lateralNPerMm: spread(pointStiffness(inner, LATERAL)),
      tangentialNPerMm: spread(pointStiffness(inner, TANGENTIAL)),
      ...found,
      profile: { underLeft: radialProfile(inner, 0), underRight: radialProfile(inner, perGap) },
      brokenSpoke: { left: breakSpoke(inner, 0), right: breakSpoke(inner, 1) },
      bucklingTensionN: scale * averageN,
    },
  }
}

/** Unknowns of the first repeat that get a unit load: the forces at every node, the moments too at the first two spokes, for the broken ones. */
const unitLoads = (nodes: number, perGap: number) =>
  Array.from({ length: nodes * PER_NODE }, (_, unknown) => unknown).filter((unknown) => {
    const node = Math.floor(unknown / PER_NODE)
    return unknown % PER_NODE < 3 || node === 0 || node === perGap
  })

/** Stiffness at each node of the first repeat in one direction, N/mm. */
export function pointStiffness({ ring, response, columnOf }: Inner, direction: number): number[] {
  return Array.from({ length: 4 * ring.perGap }, (_, node) => {
    const unknown = node * PER_NODE + direction
    return 1e-3 / displacement(response, unknown, columnOf.get(unknown) ?? 0, 0)
  })
}

/**
 * Change of tension of every spoke for a unit load on one unknown of the first repeat. By reciprocity it is the movement of that unknown when the
 * spoke is pulled, so four solutions answer every load at every position.
 */
function tensionsFor({ ring, response }: Inner, unknown: number): number[] {
  return Array.from({ length: 4 * ring.repeats }, (_, spoke) =>
    displacement(response, unknown, spoke % 4, Math.floor(spoke / 4), true),
  )
}

/** Change of tension of every spoke for a unit inward load at a node. */
export const radialProfile = (inner: Inner, node: number) =>
  tensionsFor(inner, node * PER_NODE + RADIAL).map((part) => -part)

/** Everything that is looked for over all load positions of one repeat and all spokes. */
function overPositions(inner: Inner) {
  const { tensions, ring } = inner
  let [least, greatest, lateralN] = [Infinity, -Infinity, Infinity]
  const slackBySide = { left: Infinity, right: Infinity }
  const extremes = { left: [Infinity, -Infinity], right: [Infinity, -Infinity] } as Record<
    'left' | 'right',
    [number, number]
  >
  const torqueWeightN = { front: Infinity, rear: Infinity }
  for (let node = 0; node < 4 * ring.perGap; node += 1) {
    const radial = radialProfile(inner, node)
    const lateral = tensionsFor(inner, node * PER_NODE + LATERAL)
    const torque = torqueProfile(inner, node)
    radial.forEach((change, spoke) => {
      const side = sides[spoke % 2] ?? 'left'
      const tensionN = tensions[spoke % 4] ?? 0
      least = Math.min(least, change)
      greatest = Math.max(greatest, change)
      extremes[side] = [Math.min(extremes[side][0], change), Math.max(extremes[side][1], change)]
      if (change < 0) slackBySide[side] = Math.min(slackBySide[side], tensionN / -change)
      lateralN = Math.min(lateralN, tensionN / Math.abs(lateral[spoke] ?? 0))
      for (const position of ['front', 'rear'] as const) {
        const { radial: down, tangential } = TORQUE_CASE[position]
        const lost = -(down * change) + tangential * Math.abs(torque[spoke] ?? 0)
        if (lost > 0) torqueWeightN[position] = Math.min(torqueWeightN[position], tensionN / lost)
      }
    })
  }
  const slackN = Math.min(slackBySide.left, slackBySide.right)
  const even = Math.abs(slackBySide.left - slackBySide.right) <= 1e-6 * slackN
  return {
    share: -least,
    gain: greatest,
    firstSlackN: slackN,
    firstSlackSide: even
      ? ('either' as const)
      : slackBySide.left < slackBySide.right
        ? ('left' as const)
        : ('right' as const),
    lateralFirstSlackN: lateralN,
    rangePerN: {
      left: extremes.left[1] - extremes.left[0],
      right: extremes.right[1] - extremes.right[0],
    },
    torqueWeightN,
  }
}

/** Change of tension for a unit force towards growing angle at the contact radius, hub held. */
export function torqueProfile(inner: Inner, node: number): number[] {
  const force = tensionsFor(inner, node * PER_NODE + TANGENTIAL)
  const moment = tensionsFor(inner, node * PER_NODE + 5)
  return force.map((part, i) => part + (ROLLING_RADIUS_M - inner.design.centroidRadiusM) * (moment[i] ?? 0))
}

/**
 * One spoke gone, no rider on the wheel. Its six-by-six share of the stiffness is taken out by the matrix determinant form (Woodbury), so the
 * factors of the whole wheel serve again.
 */
function breakSpoke(inner: Inner, spoke: 0 | 1): BrokenSpoke {
  const { ring, lines, tensions, design, pulls, response, columnOf } = inner
  const line = lines[spoke]
  const tensionN = tensions[spoke]
  const node = spoke * ring.perGap
  const columns = Array.from({ length: PER_NODE }, (_, i) => columnOf.get(node * PER_NODE + i) ?? 0)
  const flexibility = new Matrix(
    columns.map((_, i) => columns.map((column) => displacement(response, node * PER_NODE + i, column, 0))),
  )
  const { elastic, perTensionN } = spokeElement(line, design.spokeEaN)
  const removed = new Matrix(
    elastic.map((row, i) => row.map((value, j) => value + tensionN * (perTensionN[i]?.[j] ?? 0))),
  )
  const released = Matrix.columnVector(spokePull(line).map((part) => part * tensionN))
  // (I − F·V)·u = F·f, then the load that does the same to the whole wheel is f + V·u.
  const moved = solve(Matrix.sub(Matrix.eye(PER_NODE), flexibility.mmul(removed)), flexibility.mmul(released))
  const load = Matrix.add(released, removed.mmul(moved)).to1DArray()
  const field = (unknown: number, repeat: number) =>
    load.reduce((sum, part, i) => sum + part * displacement(response, unknown, columns[i] ?? 0, repeat), 0)
  let [lowest, highest, leastTensionN] = [Infinity, -Infinity, Infinity]
  for (let repeat = 0; repeat < ring.repeats; repeat += 1) {
    for (let at = 0; at < 4 * ring.perGap; at += 1) {
      const sideways = field(at * PER_NODE + LATERAL, repeat)
      lowest = Math.min(lowest, sideways)
      highest = Math.max(highest, sideways)
    }
    pulls.forEach((pull, other) => {
      if (repeat === 0 && other === spoke) return
      const change = pull.reduce((sum, part, i) => sum + part * field(other * ring.perGap * PER_NODE + i, repeat), 0)
      leastTensionN = Math.min(leastTensionN, (tensions[other] ?? 0) + change)
    })
  }
  return {
    shiftMm: Math.abs(moved.get(LATERAL, 0)) * 1000,
    runOutMm: (highest - lowest) * 1000,
    leastTensionN,
  }
}

/**
 * What a tyre's pressure takes from the spokes: its casing loads the rim inward with a hoop force p·π·r² (45° bias casing), spread evenly.
 * @param bar gauge pressure, widthMm of the tyre; both > 0
 * @returns hoop force in N; mean change of spoke tension with the rim's own hoop stiffness, and the bound without it, −2π·C/n
 * @throws RangeError where either is not positive
 * @source wheel reference 2.8 (DERIVED by cutting a half torus); measured tension loss was looked for and not found
 */
export function inflate({ ring, factors, design, pulls }: Inner, bar: number, widthMm: number) {
  if (!(bar > 0 && widthMm > 0)) throw new RangeError('inflate: out of range')
  const hoopN = bar * 1e5 * Math.PI * (widthMm / 2000) ** 2
  const nodes = 4 * ring.perGap
  const load = Matrix.zeros(ring.size, 1)
  for (let node = 0; node < nodes; node += 1)
    load.set(node * PER_NODE + RADIAL, 0, (-hoopN * 2 * Math.PI) / (nodes * ring.repeats))
  // The same on every repeat, so the even harmonic alone answers.
  const moved = factors.harmonics[0]?.solve(load)
  const changes = pulls.map((pull, spoke) =>
    pull.reduce((sum, part, i) => sum + part * (moved?.get(spoke * ring.perGap * PER_NODE + i, 0) ?? 0), 0),
  )
  return {
    hoopN,
    meanChangeN: changes.reduce((sum, change) => sum + change, 0) / changes.length,
    boundN: (-2 * Math.PI * hoopN) / design.spokeCount,
  }
}

/**
 * The same wheel without its pretension, loaded at spoke 0: what the spokes' steel alone does.
 * @returns null where the wheel has no stiffness of its own against windup: radial lacing on both sides
 */
export function withoutPretension(inner: Inner) {
  const { ring, pulls } = inner
  if (inner.design.crossesLeft === 0 && inner.design.crossesRight === 0) return null
  const factors = factor(ring, 0)
  if (!factors) return null
  const loads = Matrix.zeros(ring.size, 6)
  pulls.forEach((pull, spoke) => {
    pull.forEach((part, i) => {
      loads.set(spoke * ring.perGap * PER_NODE + i, spoke, part)
    })
  })
  loads.set(RADIAL, 4, 1)
  loads.set(LATERAL, 5, 1)
  const response = respond(factors, loads)
  return {
    radialNPerMm: 1e-3 / displacement(response, RADIAL, 4, 0),
    lateralNPerMm: 1e-3 / displacement(response, LATERAL, 5, 0),
    share: -Math.min(...radialProfile({ ...inner, response }, 0)),
  }
}
