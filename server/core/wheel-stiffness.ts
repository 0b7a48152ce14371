/**
 * Stiffness matrices of one rim element and one spoke, in the local directions of their rim nodes: displacements radial, tangential, lateral, then the
 * rotations about the same three. Elastic part and part from the pretension apart, so that the second can be scaled to find buckling.
 * @source wheel reference 2.4 to 2.6 (DERIVED): straight Euler–Bernoulli beams, straight two-force spokes with a rigid link to the nipple seat
 */
import { cross, dot, type SpokeLine, type Vector } from './wheel-geometry.ts'

export type Square = number[][]

export const zeros = (rows: number, columns = rows): Square =>
  Array.from({ length: rows }, () => new Array<number>(columns).fill(0))

/** Bending block of four unknowns: displacement and rotation at both ends. */
function bending(k: number, kl: number, near: number, far: number): Square {
  return [
    [k, kl, -k, kl],
    [kl, near, -kl, far],
    [-k, -kl, k, -kl],
    [kl, far, -kl, near],
  ]
}

/** Places of a block's unknowns in the element's twelve: (u x', u y', u z', θ x', θ y', θ z') at both ends. */
const inPlane = [1, 5, 7, 11]
const outOfPlane = [2, 4, 8, 10]
const along = [0, 6]
const twist = [3, 9]

function place(into: Square, block: Square, at: readonly number[], signs?: readonly number[]): void {
  block.forEach((row, i) => {
    row.forEach((value, j) => {
      const target = into[at[i] ?? 0]
      const column = at[j] ?? 0
      if (target) target[column] = (target[column] ?? 0) + value * (signs?.[i] ?? 1) * (signs?.[j] ?? 1)
    })
  })
}
const pair = (k: number): Square => [
  [k, -k],
  [-k, k],
]
/** Out of the plane a positive rotation lowers the far end, so the displacement–rotation terms change sign. */
const flipped = [1, -1, 1, -1]

/**
 * One rim element between neighbours 2π/nodes apart, 12 × 12, elastic and per newton of axial force (tension positive).
 * @param section EA in N, the others in N·m²; radiusM of the centroid
 */
export function rimElement(
  section: { eaN: number; eiRadial: number; eiLateral: number; gj: number },
  radiusM: number,
  nodes: number,
): { elastic: Square; perAxialN: Square; chordM: number } {
  const half = Math.PI / nodes
  const l = 2 * radiusM * Math.sin(half)
  const elastic = zeros(12)
  const beam = (ei: number) => bending((12 * ei) / l ** 3, (6 * ei) / l ** 2, (4 * ei) / l, (2 * ei) / l)
  place(elastic, pair(section.eaN / l), along)
  place(elastic, pair(section.gj / l), twist)
  place(elastic, beam(section.eiRadial), inPlane)
  place(elastic, beam(section.eiLateral), outOfPlane, flipped)
  const perAxialN = zeros(12)
  const stress = bending(6 / (5 * l), 1 / 10, (2 * l) / 15, -l / 30)
  place(perAxialN, stress, inPlane)
  place(perAxialN, stress, outOfPlane, flipped)
  // x' along the chord (the direction of travel half a step on), y' inward, z' lateral, in the local directions of either end.
  const axes = (sign: 1 | -1): Square => [
    [-sign * Math.sin(half), Math.cos(half), 0],
    [-Math.cos(half), -sign * Math.sin(half), 0],
    [0, 0, 1],
  ]
  const turn = zeros(12)
  ;[axes(1), axes(1), axes(-1), axes(-1)].forEach((block, at) => place(turn, block, [3 * at, 3 * at + 1, 3 * at + 2]))
  return { elastic: congruent(turn, elastic), perAxialN: congruent(turn, perAxialN), chordM: l }
}

/** Tᵀ·K·T. */
function congruent(turn: Square, k: Square): Square {
  return multiply(transpose(turn), multiply(k, turn))
}
const transpose = (a: Square): Square => (a[0] ?? []).map((_, j) => a.map((row) => row[j] ?? 0))
const multiply = (a: Square, b: Square): Square =>
  a.map((row) => (b[0] ?? []).map((_, j) => row.reduce((sum, value, k) => sum + value * (b[k]?.[j] ?? 0), 0)))

/** The spoke's pull on the six unknowns of its node, per newton of tension: Bᵀ·n, with B = [I | −S(e)]. */
export const spokePull = ({ along: n, lever: e }: SpokeLine): number[] => [...n, ...cross(e, n)]

/**
 * One spoke, 6 × 6: elastic, and per newton of its tension.
 * K_e = EA/L · b·bᵀ; K_g = Bᵀ(I − n·nᵀ)B/L, and ½(n·eᵀ + e·nᵀ) − (n·e)·I on the rotations.
 */
export function spokeElement(line: SpokeLine, eaN: number): { elastic: Square; perTensionN: Square } {
  const { along: n, lever: e, lengthM } = line
  const pull = spokePull(line)
  const elastic = pull.map((a) => pull.map((b) => (eaN / lengthM) * a * b))
  // Columns of B: how the nipple moves for each unknown.
  const unit = (i: number): Vector => [Number(i === 0), Number(i === 1), Number(i === 2)]
  const moves: Vector[] = [unit(0), unit(1), unit(2), ...[0, 1, 2].map((i) => cross(unit(i), e))]
  const perTensionN = moves.map((a, i) =>
    moves.map((b, j) => {
      const swing = (dot(a, b) - dot(a, n) * dot(b, n)) / lengthM
      if (i < 3 || j < 3) return swing
      const [p, q] = [i - 3, j - 3]
      return swing + (n[p] ?? 0) * (e[q] ?? 0) * 0.5 + (e[p] ?? 0) * (n[q] ?? 0) * 0.5 - (p === q ? dot(n, e) : 0)
    }),
  )
  return { elastic, perTensionN }
}
