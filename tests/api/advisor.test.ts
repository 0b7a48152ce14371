import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { advice, type Advice } from '#contract/advisor.ts'
import { AdviceSnapshot } from '../../server/models/advice-snapshot.ts'
import { wheelsetFacts } from '../../server/seeds/facts.ts'
import { RULES_VERSION } from '../../server/seeds/rule-tables.ts'
import reference from '../core/reference/personas.json'
import { checkPersona, type Persona } from '../support/persona-bounds.ts'
import { testApp, type TestApp } from '../support/test-app.ts'

let shop: TestApp
beforeAll(async () => {
  shop = await testApp()
})
afterAll(() => shop.close())

const facts = new Map(wheelsetFacts.map((set) => [set.sku, set]))
const road = {
  ride: 'road-long',
  bodyMassKg: 75,
  brakes: 'disc',
  tyre: { frontWidthMm: 28, rearWidthMm: 28, setup: 'tubeless' },
}
const ask = async (answers: object) => (await shop.agent().post('/api/advice').send(answers).expect(200)).body as Advice

describe('POST /api/advice', () => {
  it.each((reference.personas as unknown as Persona[]).map((persona) => [persona.id, persona] as const))(
    '%s meets every bound over the wire, in the shape that is published',
    async (_id, persona) => {
      const reply = await ask(persona.inputs)
      expect(advice.parse(reply)).toEqual(reply)
      expect(checkPersona(persona, reply, facts).failures).toEqual([])
    },
  )
  it('gives the same bytes for the same answers, under a version that names rules and catalogue', async () => {
    const [one, other] = [
      await shop.agent().post('/api/advice').send(road),
      await shop.agent().post('/api/advice').send(road),
    ]
    expect(one.text).toBe(other.text)
    expect((one.body as Advice).rulesVersion.split('+')).toEqual([
      RULES_VERSION,
      expect.stringMatching(/^[0-9a-f]{10}$/),
    ])
  })
  it('names every wheelset on sale, the ruled-out ones with their reason', async () => {
    const { wheelsets } = await ask(road)
    expect(wheelsets).toHaveLength(wheelsetFacts.length)
    for (const one of wheelsets) expect(one.rank !== null || one.codes.length > 0, one.sku).toBe(true)
  })
  it('stores nothing about a visitor', async () => {
    await ask(road)
    expect(await AdviceSnapshot.count()).toBe(0)
  })
  it('keeps a fitting only when asked, with a digest of what was kept', async () => {
    const { body } = await shop.agent().post('/api/advice-snapshots').send(road).expect(201)
    const kept = body as { adviceId: string; sha256: string }
    expect(kept.sha256).toMatch(/^[0-9a-f]{64}$/)
    expect((await AdviceSnapshot.findByPk(kept.adviceId))?.sha256).toBe(kept.sha256)
  })
  it('a wrong field names itself, in the caller’s language', async () => {
    const wrong = { ...road, bodyMassKg: 7.5, tire: 28, tyre: { ...road.tyre, frontWidthMm: 'wide' } }
    const reply = await shop.agent().post('/api/advice').set('Accept-Language', 'pt').send(wrong).expect(400)
    expect(reply.type).toBe('application/problem+json')
    const { code, errors } = reply.body as { code: string; errors: { path: string; code: string; message: string }[] }
    expect(code).toBe('validation')
    expect(errors).toContainEqual({ path: 'bodyMassKg', code: 'too-small', message: 'No mínimo 30' })
    expect(errors).toContainEqual(expect.objectContaining({ path: 'tire', code: 'unknown' }))
    expect(errors).toContainEqual(expect.objectContaining({ path: 'tyre.frontWidthMm', code: 'wrong-type' }))
  })
  it('neither mass nor band, or both, is refused by name', async () => {
    const { bodyMassKg: _, ...none } = road
    for (const [answers, path] of [
      [none, 'bodyMassKg'],
      [{ ...road, bodyMassBandKg: { from: 70, to: 80 } }, 'bodyMassBandKg'],
    ] as const) {
      const { body } = await shop.agent().post('/api/advice').send(answers).expect(400)
      expect((body as { errors: { path: string }[] }).errors.map((one) => one.path)).toContain(path)
    }
  })
})

describe('GET /api/wheelsets', () => {
  it('filters, sorts and pages by cursor without losing or doubling one', async () => {
    const agent = shop.agent()
    const all = (await agent.get('/api/wheelsets?limit=100').expect(200)).body as {
      items: { slug: string; limitKg: number; brake: string }[]
    }
    const seen: string[] = []
    let cursor: string | null = ''
    while (cursor !== null) {
      const { body } = await agent
        .get(`/api/wheelsets?limit=7&sort=limit${cursor === '' ? '' : `&cursor=${cursor}`}`)
        .expect(200)
      const page = body as { items: { slug: string; limitKg: number }[]; nextCursor: string | null }
      seen.push(...page.items.map(({ slug }) => slug))
      cursor = page.nextCursor
    }
    expect([...seen].sort()).toEqual(all.items.map(({ slug }) => slug).sort())
    const strong = (await agent.get('/api/wheelsets?limitFromKg=130&brake=disc').expect(200)).body as typeof all
    expect(strong.items.length).toBeGreaterThan(0)
    for (const { limitKg, brake } of strong.items) expect([limitKg >= 130, brake]).toEqual([true, 'disc'])
  })
  it('speaks the language asked for, and refuses an unknown filter', async () => {
    const [en, pt] = await Promise.all(
      ['en', 'pt'].map(
        async (lng) =>
          (await shop.agent().get(`/api/wheelsets/rowan-45-disc?lng=${lng}`).expect(200)).body as { tagline: string },
      ),
    )
    expect(en?.tagline).not.toBe(pt?.tagline)
    await shop.agent().get('/api/wheelsets?colour=red').expect(400)
    await shop.agent().get('/api/wheelsets/not-there').expect(404)
  })
})

describe('health', () => {
  it('is live and ready', async () => {
    for (const what of ['live', 'ready'])
      expect((await shop.agent().get(`/api/health/${what}`).expect(200)).body).toEqual({ status: 'ok' })
  })
})
