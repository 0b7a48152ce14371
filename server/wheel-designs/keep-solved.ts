/** Brings every wheel's kept solution up to its present design. Called when the shop starts and after a wheel or a part of one is saved. */
import type { Transaction } from 'sequelize'
import { Hub } from '../models/hub.ts'
import { Rim } from '../models/rim.ts'
import { Spoke } from '../models/spoke.ts'
import { WheelsetWheel } from '../models/wheelset-wheel.ts'
import { designDigest, solveDesign, type SolvedWheel } from './solve.ts'

/**
 * @returns how many wheels were solved anew; wheels of one design are solved once
 * @throws RangeError or TensionBuckles for a design that the model refuses: the caller's save must not stand
 */
export async function keepSolved(transaction?: Transaction): Promise<number> {
  const inside = transaction ? { transaction } : {}
  const [wheels, rims, hubs, spokes] = await Promise.all([
    WheelsetWheel.findAll({ attributes: { exclude: ['strength', 'structure'] }, ...inside }),
    Rim.findAll(inside),
    Hub.findAll(inside),
    Spoke.findAll(inside),
  ])
  const byId = <T extends { id: number }>(rows: readonly T[]) => new Map(rows.map((row) => [row.id, row]))
  const [rimById, hubById, spokeById] = [byId(rims), byId(hubs), byId(spokes)]
  const solved = new Map<string, SolvedWheel>()
  let count = 0
  for (const wheel of wheels) {
    const [rim, hub, spoke] = [rimById.get(wheel.rimId), hubById.get(wheel.hubId), spokeById.get(wheel.spokeId)]
    if (!rim || !hub || !spoke) throw new Error(`wheel ${wheel.id} lacks a part`)
    const { position, tensionTightN, spokeCount, crossesLeft, crossesRight } = wheel
    const parts = { position, tensionTightN, spokeCount, crossesLeft, crossesRight, rim, hub, spoke }
    const digest = designDigest(parts)
    if (digest === wheel.designDigest) continue
    const found = solved.get(digest) ?? solveDesign(parts)
    solved.set(digest, found)
    await wheel.update({ designDigest: digest, strength: found.strength, structure: found.structure }, inside)
    count += 1
  }
  return count
}
