// Exits with 0 as soon as the address answers 200, with 1 after the given milliseconds: node waitFor.mjs URL MS
const [url, ms] = process.argv.slice(2);
const end = performance.now() + Number(ms);
while (performance.now() < end) {
  const response = await fetch(url).catch(() => null);
  if (response?.ok) process.exit(0);
  await new Promise((resolve) => setTimeout(resolve, 50));
}
process.exit(1);
