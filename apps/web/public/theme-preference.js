// Runs before the first paint so that a chosen theme does not flash; lib/theme/preference.ts does the rest.
(function () {
  let stored;
  try {
    stored = localStorage.getItem('overtally.theme');
  } catch {
    stored = null; // storage is closed to this page: follow the system
  }
  const dark =
    stored === 'dark' || (stored !== 'light' && matchMedia('(prefers-color-scheme: dark)').matches);
  document.documentElement.classList.add(dark ? 'dark' : 'light');
})();
