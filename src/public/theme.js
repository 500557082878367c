// Sets the chosen colours before the first paint. A file of its own, because the content
// security policy allows no script inside the page. The key is that of src/ui/theme.ts.
try {
  const theme = localStorage.getItem('flightcase-theme');
  if (theme === 'light' || theme === 'dark') document.documentElement.dataset.theme = theme;
} catch {
  // Storage may be forbidden; then the device's colours stay.
}
