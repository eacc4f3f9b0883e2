import { useEffect, useState } from 'react'

const EVERY_MS = 30_000

/** The time, in milliseconds, as a page shows it: it moves on while the page stays open. */
export function useNow(): number {
  const [now, setNow] = useState(() => Date.now())
  useEffect(() => {
    const timer = setInterval(() => setNow(Date.now()), EVERY_MS)
    return () => clearInterval(timer)
  }, [])
  return now
}
