/** The product desk: the tables that the sums go by, as dated versions. */
import { z } from 'zod'
import { isoTime, listOf, staffReason } from './common.ts'
import { limitStandings } from './product-desk.ts'

/** What a table rests on: read at its source, told from memory, worked out from others, or common practice. */
export const sourceLabels = ['read', 'memory', 'derived', 'practice'] as const

export const ruleVersionHead = z.object({
  id: z.number().int(),
  table: z.string(),
  /** `YYYY-MM.N`, rising. */
  version: z.string(),
  standing: z.enum(limitStandings),
  source: z.string(),
  label: z.enum(sourceLabels),
  reason: z.string(),
  draftedBy: z.string().nullable(),
  secondedBy: z.string().nullable(),
  /** Null: from the moment it is seconded. */
  inForceFrom: isoTime.nullable(),
  createdAt: isoTime,
  /** The version that it was written over; null for the first. */
  basedOn: z.string().nullable(),
  /** A draft over a version that another one has followed since: it cannot be seconded any more. */
  stale: z.boolean(),
  /** Drafted by the person who asks, who therefore cannot second it. */
  own: z.boolean(),
})
export type RuleVersionHead = z.infer<typeof ruleVersionHead>

/** The shape of `data` is the table's own and is checked by it (server/core/rules.ts). */
export const ruleVersion = ruleVersionHead.extend({ data: z.record(z.string(), z.unknown()) })
export type RuleVersionView = z.infer<typeof ruleVersion>

export const ruleTableRow = z.object({
  name: z.string(),
  current: ruleVersionHead.nullable(),
  /** Drafts and versions that are seconded for later, newest first. */
  waiting: z.array(ruleVersionHead),
  versions: z.number().int(),
})
export type RuleTableRow = z.infer<typeof ruleTableRow>
export const ruleTableList = listOf(ruleTableRow)

export const ruleTableView = z.object({
  name: z.string(),
  /** The newest seconded version, in force or coming: the next draft is written over it. */
  base: ruleVersion,
  /** Newest first, all of them. */
  versions: z.array(ruleVersion),
})
export type RuleTableView = z.infer<typeof ruleTableView>

export const ruleDraft = z.strictObject({
  table: z.string().trim().min(1).max(80),
  data: z.record(z.string(), z.unknown()),
  source: z.string().trim().min(10).max(4000),
  label: z.enum(sourceLabels),
  reason: staffReason,
  /** Left out: from the moment it is seconded. */
  inForceFrom: z.iso.datetime({ offset: true }).optional(),
  /** The version that was on the screen; if another one has followed it, the draft is refused. */
  basedOn: z.string().trim().max(20).optional(),
})
export type RuleDraft = z.output<typeof ruleDraft>
