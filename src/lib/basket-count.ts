import { useBasket } from './basket.ts'

/** How many wheelsets lie in the basket; 0 while unknown. */
export function useBasketCount(): number {
  const { data } = useBasket()
  return data?.lines.reduce((sum, line) => sum + line.quantity, 0) ?? 0
}
