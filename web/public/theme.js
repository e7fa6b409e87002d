// Runs before the first paint. The words match web/src/lib/theme.ts; anything else means "as the system".
(function () {
  try {
    var chosen = localStorage.getItem('evenbeam.theme');
    if (chosen === 'light' || chosen === 'dark') document.documentElement.setAttribute('data-theme', chosen);
  } catch {
    // Storage may be closed to this page; the system's theme is the fallback.
  }
})();
