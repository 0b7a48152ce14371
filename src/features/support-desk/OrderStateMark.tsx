import { useTranslation } from 'react-i18next'
import { orderStates, type OrderState } from '#contract/checkout.ts'

/** Stations of an order that goes well; `query` is a stop on the way to `cleared`, `dropped` ends it. */
const stations: OrderState[] = orderStates.filter((state) => state !== 'query' && state !== 'dropped')

/** How far an order has come: its word, and a rail with one tick a station. */
export function OrderStateMark({ state, rail = true }: { state: OrderState; rail?: boolean }) {
  const { t } = useTranslation('support-desk')
  const at = state === 'query' ? stations.indexOf('placed') : stations.indexOf(state)
  return (
    <span className="inline-flex items-center gap-2 whitespace-nowrap">
      {rail && (
        <svg aria-hidden viewBox="0 0 58 12" className="h-3 w-14 flex-none max-sm:hidden">
          <path d="M1 6H57" stroke="var(--line)" strokeWidth="1" />
          {state === 'dropped' ? (
            <path d="M24 1 34 11M34 1 24 11" stroke="currentColor" strokeWidth="1.6" />
          ) : (
            stations.map((station, index) => (
              <path
                key={station}
                d={index === at ? `M${1 + index * 8} 0V12` : `M${1 + index * 8} 3V9`}
                stroke={
                  index <= at
                    ? state === 'query' && index === at
                      ? 'var(--near)'
                      : 'currentColor'
                    : 'var(--line-strong)'
                }
                strokeWidth={index === at ? 2.6 : 1}
              />
            ))
          )}
        </svg>
      )}
      <span
        className={
          state === 'query'
            ? 'font-bold text-near'
            : state === 'dropped'
              ? 'text-soft line-through decoration-1'
              : 'font-[650]'
        }
      >
        {t(`state.${state}`)}
      </span>
    </span>
  )
}
