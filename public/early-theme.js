// Puts the chosen theme on the page before its first paint: a dark control room is not to be lit up by every reload.
// Preferences (src/app/core/preferences.ts) writes what is read here, and takes over once the application runs.
try {
  const { theme } = JSON.parse(globalThis.localStorage.getItem('dewmark.preferences') ?? '{}');
  if (theme === 'day' || theme === 'night')
    globalThis.document.documentElement.setAttribute('data-theme', theme);
} catch {
  // Storage is forbidden or holds something else: the computer's own theme then stands.
}
