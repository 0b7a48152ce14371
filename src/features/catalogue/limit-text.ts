import { useCallback } from 'react'
import { useFormat, type Shown } from '../../lib/format.ts'

/** A stated limit in the visitor's unit, never rounded up; whole kilograms without a decimal, as they are stated. */
export function useLimitText(): (kg: number) => Shown {
  const format = useFormat()
  return useCallback(
    (kg) => {
      const shown = format.mass(kg, 'down')
      if (shown.unit !== 'kg' || !Number.isInteger(kg)) return shown
      const value = format.number(kg)
      return { ...shown, value, text: `${value}\u00a0kg` }
    },
    [format],
  )
}
