import { useEffect } from 'react'

/** Gives the pages of an academy its accent, in the tone of the theme that is on. */
export function useAccent(academy: { accent: string; accentDusk: string } | undefined): void {
  const light = academy?.accent
  const dusk = academy?.accentDusk
  useEffect(() => {
    const root = document.documentElement
    const apply = () => {
      const accent = root.dataset['theme'] === 'dusk' ? dusk : light
      if (accent) root.style.setProperty('--color-accent', accent)
    }
    apply()
    const observer = new MutationObserver(apply)
    observer.observe(root, { attributes: true, attributeFilter: ['data-theme'] })
    return () => {
      observer.disconnect()
      root.style.removeProperty('--color-accent')
    }
  }, [light, dusk])
}

/** Names the page in the window's title. */
export function useTitle(title: string | undefined): void {
  useEffect(() => {
    if (title) document.title = title
  }, [title])
}
