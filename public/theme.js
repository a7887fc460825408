// Before the first paint: the scheme that was chosen on this device, where it differs from the system's.
try {
  const choice = localStorage.getItem('yardbell-theme');
  if (choice === 'light' || choice === 'dark') document.documentElement.dataset.theme = choice;
} catch {
  // no storage: the system's scheme
}
