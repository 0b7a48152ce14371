import { useEffect, useState } from 'react'

/** Grey bars the size of what comes, shown only once the wait is felt (150 ms). `label` is for those who cannot see them. */
export function Waiting({ label, rows = 3, className }: { label: string; rows?: number; className?: string }) {
  const [late, setLate] = useState(false)
  useEffect(() => {
    const timer = setTimeout(() => {
      setLate(true)
    }, 150)
    return () => {
      clearTimeout(timer)
    }
  }, [])
  return (
    <div role="status" className={className}>
      <span className="sr-only">{label}</span>
      <div aria-hidden className={`grid gap-3 ${late ? '' : 'invisible'}`}>
        {Array.from({ length: rows }, (_, row) => (
          <div key={row} className="h-14 animate-pulse border border-line bg-ground" />
        ))}
      </div>
    </div>
  )
}
