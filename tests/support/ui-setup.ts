/** Takes each rendered tree away again; Testing Library does so by itself only where vitest's globals are on. */
import { cleanup } from '@testing-library/react'
import { afterEach } from 'vitest'

afterEach(cleanup)
