import { useEffect, useState } from 'react'

/** A value once it has stood still for a while: what is asked for by typing is asked once. */
export function useSettled<Value>(value: Value, waitMs: number): Value {
  const [settled, setSettled] = useState(value)
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), waitMs)
    return () => clearTimeout(timer)
  }, [value, waitMs])
  return settled
}
