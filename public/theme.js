// Runs before the first paint, so that nobody who chose the dark sees a flash of paper.
;(function () {
  var chosen = null
  try {
    chosen = localStorage.getItem('marram.theme')
  } catch {
    // A browser that keeps nothing follows the system.
  }
  var isDark = chosen ? chosen === 'dusk' : matchMedia('(prefers-color-scheme: dark)').matches
  if (isDark) document.documentElement.dataset.theme = 'dusk'
})()
