/** The OpenAPI 3.1 document, made from the same table and the same zod schemas that check the calls. */
import { z } from 'zod'
import { problem } from '#contract/common.ts'
import type { Route } from './route.ts'

type Json = Record<string, unknown>

// OpenAPI 3.1 speaks JSON Schema 2020-12, which zod writes itself.
const schemaOf = (schema: z.ZodType, io: 'input' | 'output'): Json => {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as Json
  return rest
}

function parameters(schema: z.ZodType | undefined, where: 'path' | 'query'): Json[] {
  if (!schema) return []
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as {
    properties?: Record<string, Json>
    required?: string[]
  }
  return Object.entries(properties).map(([name, one]) => ({
    name,
    in: where,
    required: where === 'path' || required.includes(name),
    schema: one,
  }))
}

const problemAnswer = (description: string) => ({
  description,
  content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
})

export const openApiPath = (path: string) => path.replace(/:(\w+)/g, '{$1}')

export function openApiDocument(routes: readonly Route[], publicUrl: string): Json {
  const paths: Record<string, Json> = {}
  for (const { spec } of routes) {
    const key = {
      name: 'Idempotency-Key',
      in: 'header',
      required: spec.idempotency === 'required',
      schema: { type: 'string', minLength: 8, maxLength: 80 },
    }
    const status = String(spec.status ?? 200)
    const operation: Json = {
      operationId: `${spec.method}${openApiPath(spec.path).replace(/[^a-zA-Z0-9]+(\w)?/g, (_, next: string | undefined) => (next ?? '').toUpperCase())}`,
      tags: [spec.feature],
      summary: spec.summary,
      'x-roles': spec.access === 'anyone' ? ['anyone'] : [...spec.access],
      security: spec.access === 'anyone' ? [] : [{ session: [] }],
      parameters: [
        ...parameters(spec.params, 'path'),
        ...parameters(spec.query, 'query'),
        ...(spec.idempotency ? [key] : []),
      ],
      responses: {
        [status]: {
          description: spec.summary,
          content: spec.contentType
            ? { [spec.contentType]: {} }
            : { 'application/json': { schema: schemaOf(spec.reply, 'output') } },
        },
        ...(spec.body || spec.query || spec.params
          ? { 400: problemAnswer('A field is wrong; `errors` names it') }
          : {}),
        ...(spec.access === 'anyone'
          ? {}
          : { 401: problemAnswer('Nobody is signed in'), 403: problemAnswer('The role may not do this') }),
        default: problemAnswer('Any other refusal'),
      },
    }
    if (spec.body) {
      operation.requestBody = {
        required: true,
        content: { 'application/json': { schema: schemaOf(spec.body, 'input') } },
      }
    } else if (spec.raw) {
      operation.requestBody = { required: true, content: { 'application/json': { schema: { type: 'object' } } } }
    }
    const path = (paths[openApiPath(spec.path)] ??= {})
    path[spec.method] = operation
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Felloe',
      version: '1',
      description:
        'Units stand in the field names; SI on the wire; money in minor units beside an ISO 4217 currency. Errors are RFC 9457 problems.',
    },
    servers: [{ url: publicUrl }],
    paths,
    components: {
      schemas: { Problem: schemaOf(problem, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: 'felloe' } },
    },
  }
}
