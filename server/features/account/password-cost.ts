/** What one password's hash costs. Argon2id, 19 MiB, two passes, one lane: the least that OWASP's password storage sheet advises (MEMORY). */
export const PASSWORD_COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1 }
