/**
 * The wheel's stiffness, solved ring harmonic by ring harmonic. Lacing repeats every four spokes, so in local directions the matrix is
 * block-circulant: a Fourier transform over the repeats leaves one small matrix for each harmonic in place of one of 6·n·m unknowns. Nothing is
 * approximated by it; tests hold it to the full matrix.
 */
import { CholeskyDecomposition, Matrix } from 'ml-matrix'
import type { SpokeLine } from './wheel-geometry.ts'
import { rimElement, spokeElement, zeros, type Square } from './wheel-stiffness.ts'

/** Unknowns of a rim node, in order. */
export const RADIAL = 0
export const TANGENTIAL = 1
export const LATERAL = 2
export const PER_NODE = 6

/** Blocks of one repeat: on itself, and on the repeat that follows. */
interface Blocks {
  own: Square
  next: Square
}

export interface Ring {
  /** Rim elements for each spoke gap. */
  perGap: number
  /** Times that the lacing repeats: spokes / 4. */
  repeats: number
  /** Unknowns of one repeat. */
  size: number
  elastic: Blocks
  /** From the pretension as stated. */
  geometric: Blocks
  /** cos 2πk/repeats for each k, then sin 2πk/repeats. */
  cosines: number[]
}

/**
 * Assembles one repeat: 4·perGap rim elements and four spokes.
 * The rim's compression is taken as the polygon's own, Σ(T·n_r)/(2N·sin(π/N)), so that the prestress balances on this mesh too.
 * @param tensionN of the four spokes in turn
 */
export function assemble(
  section: { eaN: number; eiRadial: number; eiLateral: number; gj: number },
  centroidRadiusM: number,
  lines: readonly SpokeLine[],
  spokeEaN: number,
  tensionN: readonly number[],
  repeats: number,
  perGap: number,
): Ring {
  const nodes = 4 * perGap
  const total = nodes * repeats
  const size = PER_NODE * nodes
  const ring: Ring = {
    perGap,
    repeats,
    size,
    elastic: { own: zeros(size), next: zeros(size) },
    geometric: { own: zeros(size), next: zeros(size) },
    cosines: [Math.cos, Math.sin].flatMap((part) =>
      Array.from({ length: repeats }, (_, k) => part((2 * Math.PI * k) / repeats)),
    ),
  }
  const inward = lines.reduce((sum, { along }, i) => sum + (tensionN[i] ?? 0) * along[0], 0) * repeats
  const axialN = -inward / (2 * total * Math.sin(Math.PI / total))
  const element = rimElement(section, centroidRadiusM, total)
  const add = (into: Blocks, matrix: Square, factor: number, a: number, b: number) => {
    matrix.forEach((row, i) => {
      row.forEach((value, j) => {
        const [p, q] = [i < PER_NODE ? a : b, j < PER_NODE ? a : b]
        // Across the seam only the upper block is kept; the lower one is its transpose.
        if (p >= nodes && q < nodes) return
        const block = q >= nodes && p < nodes ? into.next : into.own
        const target = block[(p % nodes) * PER_NODE + (i % PER_NODE)]
        const column = (q % nodes) * PER_NODE + (j % PER_NODE)
        if (target) target[column] = (target[column] ?? 0) + factor * value
      })
    })
  }
  for (let node = 0; node < nodes; node += 1) {
    add(ring.elastic, element.elastic, 1, node, node + 1)
    add(ring.geometric, element.perAxialN, axialN, node, node + 1)
  }
  lines.forEach((line, i) => {
    const { elastic, perTensionN } = spokeElement(line, spokeEaN)
    add(ring.elastic, elastic, 1, i * perGap, i * perGap)
    add(ring.geometric, perTensionN, tensionN[i] ?? 0, i * perGap, i * perGap)
  })
  return ring
}

/**
 * The matrix of one harmonic at `scale` times the pretension: own + next·e^{iφ} + nextᵀ·e^{−iφ}, φ = 2π·harmonic/repeats.
 * Hermitian; written as the real symmetric [[Re, −Im], [Im, Re]] where it has an imaginary part.
 */
function harmonicMatrix(ring: Ring, harmonic: number, scale: number): Matrix {
  const { size, elastic, geometric } = ring
  const phase = (2 * Math.PI * harmonic) / ring.repeats
  const real = isReal(ring, harmonic)
  const [cos, sin] = [Math.cos(phase), Math.sin(phase)]
  const matrix = Matrix.zeros(real ? size : 2 * size, real ? size : 2 * size)
  for (let i = 0; i < size; i += 1) {
    for (let j = 0; j <= i; j += 1) {
      const own = at(elastic.own, i, j) + scale * at(geometric.own, i, j)
      const upper = at(elastic.next, i, j) + scale * at(geometric.next, i, j)
      const lower = at(elastic.next, j, i) + scale * at(geometric.next, j, i)
      const re = own + cos * (upper + lower)
      matrix.set(i, j, re)
      matrix.set(j, i, re)
      if (real) continue
      const im = sin * (upper - lower)
      matrix.set(size + i, size + j, re)
      matrix.set(size + j, size + i, re)
      matrix.set(size + i, j, im)
      matrix.set(j, size + i, im)
      matrix.set(size + j, i, -im)
      matrix.set(i, size + j, -im)
    }
  }
  return matrix
}
const at = (a: Square, i: number, j: number) => a[i]?.[j] ?? 0
const isReal = (ring: Ring, harmonic: number) => harmonic === 0 || 2 * harmonic === ring.repeats
const lastHarmonic = (ring: Ring) => Math.floor(ring.repeats / 2)

/** Movements of every repeat for some loads on the first one, by harmonic: real parts above imaginary ones, one column a load. */
export interface Response {
  ring: Ring
  byHarmonic: Matrix[]
}

export interface Factors {
  ring: Ring
  harmonics: CholeskyDecomposition[]
}

/** Factors every harmonic at `scale` times the pretension. @returns null when the wheel is at or past its buckling tension */
export function factor(ring: Ring, scale = 1): Factors | null {
  const harmonics: CholeskyDecomposition[] = []
  for (let h = 0; h <= lastHarmonic(ring); h += 1) {
    const one = factorOne(ring, h, scale)
    if (!one) return null
    harmonics.push(one)
  }
  return { ring, harmonics }
}

/**
 * Solves for loads on the first repeat.
 * @param loads size × columns
 */
export function respond({ ring, harmonics }: Factors, loads: Matrix): Response {
  const padded = Matrix.zeros(2 * ring.size, loads.columns)
  padded.setSubMatrix(loads, 0, 0)
  return { ring, byHarmonic: harmonics.map((one, h) => one.solve(isReal(ring, h) ? loads : padded)) }
}

/**
 * Displacement of one unknown of one repeat, for one of the loads.
 * u = (1/S)·Σ_h e^{iφ_h·s}·û_h; harmonics beyond the half are the conjugates of those below it.
 * @param swapped the load and the unknown change places: by reciprocity the same solution answers both
 */
export function displacement(
  { ring, byHarmonic }: Response,
  unknown: number,
  column: number,
  repeat: number,
  swapped = false,
) {
  const { size, repeats, cosines } = ring
  let sum = 0
  for (let h = 0; h < byHarmonic.length; h += 1) {
    const field = byHarmonic[h]
    if (!field) continue
    const turn = (h * repeat) % repeats
    const real = field.get(unknown, column) * (cosines[turn] ?? 0)
    if (field.rows === size) sum += real
    else {
      // sin φ = cos(φ − 90°), kept in the same table after the cosines.
      const imaginary = field.get(size + unknown, column) * (cosines[repeats + turn] ?? 0)
      sum += 2 * (swapped ? real + imaginary : real - imaginary)
    }
  }
  return sum / repeats
}

/** One harmonic at `scale` times the pretension, or null where it is not positive definite. */
function factorOne(ring: Ring, harmonic: number, scale: number): CholeskyDecomposition | null {
  const one = new CholeskyDecomposition(harmonicMatrix(ring, harmonic, scale))
  return one.isPositiveDefinite() ? one : null
}

/**
 * Multiple of the pretension at which one harmonic gives way: inverse iteration from a factored state below it, on
 * (K(s) + (λ − s)·K_g)·x = 0. The nearer the state, the faster it settles.
 */
function harmonicBuckling(ring: Ring, harmonic: number, guess: number): number {
  let scale = guess
  let factored = factorOne(ring, harmonic, scale)
  // A wheel laced radially on both sides has no elastic windup stiffness, so zero itself is no safe start.
  while (!factored && scale > 1e-4) factored = factorOne(ring, harmonic, (scale *= 0.8))
  if (!factored) return 0
  const geometric = harmonicMatrix({ ...ring, elastic: nothing(ring) }, harmonic, -1)
  const n = geometric.rows
  let x = Matrix.columnVector(Array.from({ length: n }, (_, i) => Math.cos(i * i + 1)))
  let found = Infinity
  for (let step = 0; step < 200; step += 1) {
    const load = geometric.mmul(x)
    const next = factored.solve(load)
    // Rayleigh quotient in the norm of the factored state.
    const ratio = next.dot(load) / x.dot(load)
    const now = ratio > 0 ? scale + 1 / ratio : Infinity
    x = Matrix.div(next, next.norm())
    if (Math.abs(now - found) <= 1e-5 * now) return now
    found = now
  }
  return found
}
const nothing = ({ size }: Ring): Blocks => ({ own: zeros(size), next: zeros(size) })

/**
 * Least multiple of the stated pretension at which the wheel gives way sideways.
 * @param guess from the closed form; only the number of steps depends on it
 */
export function bucklingScale(ring: Ring, guess: number): number {
  // Mode 2 governs in practice, so its harmonic comes first and the others mostly need one look.
  let least = harmonicBuckling(ring, 2, guess)
  for (let harmonic = 0; harmonic <= lastHarmonic(ring); harmonic += 1)
    if (harmonic !== 2 && !factorOne(ring, harmonic, least)) least = harmonicBuckling(ring, harmonic, least * 0.9)
  return least
}
