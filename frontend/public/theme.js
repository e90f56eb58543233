try {
  const theme = localStorage.getItem('overwinter.theme');
  if (theme === 'light' || theme === 'dark') document.documentElement.dataset.theme = theme;
} catch {
  // Storage is blocked: the system's choice holds.
}
