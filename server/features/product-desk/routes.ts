import { z } from 'zod'
import {
  auditFilters,
  auditList,
  limitDecision,
  limitDraft,
  limitImpact as limitImpactReply,
  limitList,
  limitVersion,
  productChange,
  productList,
  productWheelset,
} from '#contract/product-desk.ts'
import { ruleDraft, ruleTableList, ruleTableView, ruleVersion } from '#contract/product-desk-rules.ts'
import { listAudit } from '../../audit/list.ts'
import { route, signedIn, type Route } from '../../http/route.ts'
import { changeWheelset } from './change-wheelset.ts'
import { limitImpact } from './impact.ts'
import { draftLimit, listLimits, rejectLimit, secondLimit } from './limits.ts'
import { listProducts, readProduct } from './read.ts'
import { draftRules, listRules, readRuleTable, rejectRules, secondRules } from './rules.ts'

const feature = 'product-desk'
const access = ['product', 'admin'] as const
const bySku = z.object({ sku: z.string().max(40) })
const byName = z.object({ name: z.string().max(80) })
const byId = z.object({ id: z.coerce.number<string>().int().min(1).max(4_294_967_295) })

export const productDeskRoutes: Route[] = [
  route(
    {
      method: 'get',
      path: '/api/product/wheelsets',
      feature,
      access,
      summary: 'Every wheelset, on sale or not, with limit, stock and prices',
      reply: productList,
    },
    ({ deps }) => listProducts(deps),
  ),
  route(
    {
      method: 'get',
      path: '/api/product/wheelsets/:sku',
      feature,
      access,
      summary: 'One wheelset with its words and its prices over time',
      params: bySku,
      reply: productWheelset,
    },
    ({ deps, params }) => readProduct(deps, params.sku),
  ),
  route(
    {
      method: 'patch',
      path: '/api/product/wheelsets/:sku',
      feature,
      access,
      summary: 'Change words, prices, stock or sale; refused if somebody else changed it since',
      params: bySku,
      body: productChange,
      reply: productWheelset,
    },
    (call) => changeWheelset(call.deps, signedIn(call), call.params.sku, call.body),
  ),
  route(
    {
      method: 'get',
      path: '/api/product/limits',
      feature,
      access,
      summary: 'The limit of every wheelset, and all its dated versions',
      reply: limitList,
    },
    (call) => listLimits(call.deps, signedIn(call)),
  ),
  route(
    {
      method: 'post',
      path: '/api/product/limit-changes',
      feature,
      access,
      summary: 'Draft a limit change; a second person puts it in force',
      body: limitDraft,
      reply: limitVersion,
      status: 201,
      idempotency: 'optional',
    },
    (call) => draftLimit(call.deps, signedIn(call), call.body),
  ),
  route(
    {
      method: 'get',
      path: '/api/product/limit-changes/:id/impact',
      feature,
      access,
      summary: 'Baskets and orders whose total is above the new limit',
      params: byId,
      reply: limitImpactReply,
    },
    ({ deps, params }) => limitImpact(deps, params.id),
  ),
  route(
    {
      method: 'post',
      path: '/api/product/limit-changes/:id/approve',
      feature,
      access,
      summary: 'Second a limit change drafted by somebody else',
      params: byId,
      body: limitDecision,
      reply: limitVersion,
    },
    (call) => secondLimit(call.deps, signedIn(call), call.params.id, call.body.reason),
  ),
  route(
    {
      method: 'post',
      path: '/api/product/limit-changes/:id/reject',
      feature,
      access,
      summary: 'Turn a limit change down, or stop it before its time has come',
      params: byId,
      body: limitDecision,
      reply: limitVersion,
    },
    (call) => rejectLimit(call.deps, signedIn(call), call.params.id, call.body.reason),
  ),
  route(
    {
      method: 'get',
      path: '/api/product/rules',
      feature,
      access,
      summary: 'The tables that the sums go by: version in force, and what waits',
      reply: ruleTableList,
    },
    (call) => listRules(call.deps, signedIn(call)),
  ),
  route(
    {
      method: 'get',
      path: '/api/product/rules/:name',
      feature,
      access,
      summary: 'One table of the sums with all its dated versions',
      params: byName,
      reply: ruleTableView,
    },
    (call) => readRuleTable(call.deps, call.params.name, signedIn(call)),
  ),
  route(
    {
      method: 'post',
      path: '/api/product/rule-changes',
      feature,
      access,
      summary: 'Draft a new version of a table; a second person puts it in force',
      body: ruleDraft,
      reply: ruleVersion,
      status: 201,
      idempotency: 'optional',
    },
    (call) => draftRules(call.deps, signedIn(call), call.body),
  ),
  route(
    {
      method: 'post',
      path: '/api/product/rule-changes/:id/approve',
      feature,
      access,
      summary: 'Second a version drafted by somebody else; refused if another has followed since',
      params: byId,
      body: limitDecision,
      reply: ruleVersion,
    },
    (call) => secondRules(call.deps, signedIn(call), call.params.id, call.body.reason),
  ),
  route(
    {
      method: 'post',
      path: '/api/product/rule-changes/:id/reject',
      feature,
      access,
      summary: 'Turn a new version down, or stop it before its time has come',
      params: byId,
      body: limitDecision,
      reply: ruleVersion,
    },
    (call) => rejectRules(call.deps, signedIn(call), call.params.id, call.body.reason),
  ),
  route(
    {
      method: 'get',
      path: '/api/product/audit',
      feature,
      access: ['support', ...access],
      summary: 'Who of the staff changed what, when and why',
      query: auditFilters,
      reply: auditList,
    },
    ({ query }) => listAudit(query),
  ),
]
