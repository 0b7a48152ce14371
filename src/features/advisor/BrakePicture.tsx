/** Where a brake sits, seen from the side: at the hub or at the rim. Drawn for this product. */
export function BrakePicture({ kind, className }: { kind: 'rim' | 'disc'; className?: string }) {
  return (
    <svg
      aria-hidden
      focusable="false"
      viewBox="0 0 80 64"
      className={className}
      fill="none"
      stroke="currentColor"
      strokeWidth="1.5"
      strokeLinecap="round"
      strokeLinejoin="round"
    >
      {kind === 'disc' ? (
        <>
          <path d="M10 62A34 34 0 1 1 70 62" strokeWidth="1" opacity="0.6" />
          <path d="M14 62A30 30 0 1 1 66 62" strokeWidth="1" opacity="0.6" />
          <circle cx="40" cy="44" r="15" className="text-own" strokeWidth="2.2" />
          <circle cx="40" cy="44" r="5" />
          <path d="M40 39V29M44.3 46.5 53 51.5M35.7 46.5 27 51.5" />
          <path d="M52 31.5 57.5 37 54 43.5 48.4 39.6Z" fill="currentColor" />
          <path d="M40 44 62 6" />
        </>
      ) : (
        <>
          <path d="M4 62A37 37 0 0 1 76 62" strokeWidth="1" opacity="0.6" />
          <path d="M9.5 62A31.5 31.5 0 0 1 70.5 62" className="text-own" strokeWidth="2.2" />
          <path d="M33 16.5V9.5Q40 3 47 9.5V16.5" />
          <rect x="28" y="26.5" width="9" height="6" fill="currentColor" transform="rotate(-7 32 29)" />
          <rect x="43" y="26.5" width="9" height="6" fill="currentColor" transform="rotate(7 48 29)" />
          <path d="M33 16.5 32.6 27M47 16.5 47.4 27M40 5V1.5" />
          <path d="M40 62V34M24 62 30 36M56 62 50 36" strokeWidth="1" opacity="0.6" />
        </>
      )}
    </svg>
  )
}
