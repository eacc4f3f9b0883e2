import { useState } from 'react'

/** Paper by day, lamplight after dusk: the person's choice is kept on this device. */
export function ThemeSwitch() {
  const [isDusk, setIsDusk] = useState(() => document.documentElement.dataset['theme'] === 'dusk')
  const change = () => {
    const next = !isDusk
    if (next) document.documentElement.dataset['theme'] = 'dusk'
    else delete document.documentElement.dataset['theme']
    try {
      localStorage.setItem('marram.theme', next ? 'dusk' : 'light')
    } catch {
      // A browser that keeps nothing still shows the choice until it is closed.
    }
    setIsDusk(next)
  }
  return (
    <button type="button" className="linkish" onClick={change}>
      {isDusk ? 'Daylight colours' : 'After-dusk colours'}
    </button>
  )
}
