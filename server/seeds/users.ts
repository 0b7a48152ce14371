/** Invented people who can sign in to the demo, one for each role; their passwords are printed in README.md. */
import { createHash } from 'node:crypto'
import { hash } from '@node-rs/argon2'
import { PASSWORD_COST } from '../features/account/password-cost.ts'

export const demoUsers = [
  {
    id: 1,
    email: 'rider@felloe.example',
    name: 'Inês Carvalhal',
    role: 'rider',
    locale: 'pt',
    password: 'rider-demo-2026',
  },
  {
    id: 2,
    email: 'support@felloe.example',
    name: 'Tomé Valadim',
    role: 'support',
    locale: 'en',
    password: 'support-demo-2026',
  },
  {
    id: 3,
    email: 'product@felloe.example',
    name: 'Marta Quintela',
    role: 'product',
    locale: 'en',
    password: 'product-demo-2026',
  },
  {
    id: 4,
    email: 'product2@felloe.example',
    name: 'Rui Albarran',
    role: 'product',
    locale: 'pt',
    password: 'product2-demo-2026',
  },
  {
    id: 5,
    email: 'admin@felloe.example',
    name: 'Edda Lindqvarn',
    role: 'admin',
    locale: 'en',
    password: 'admin-demo-2026',
  },
] as const

/** The demo's salts are fixed by the address, as its passwords are public and two seeds must be equal. Real accounts get random salts. */
const withPasswordHash = async ({ password, ...user }: (typeof demoUsers)[number]) => {
  const salt = createHash('sha256').update(`demo:${user.email}`).digest().subarray(0, 16)
  return { ...user, passwordHash: await hash(password, { ...PASSWORD_COST, salt }) }
}

let rows: Promise<Awaited<ReturnType<typeof withPasswordHash>>[]> | undefined
/** All of them with their hashes, worked out once in a process: tests seed many times. */
export const demoUserRows = () => (rows ??= Promise.all(demoUsers.map(withPasswordHash)))
