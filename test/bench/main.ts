import type { BenchLine } from './bench-line';

/** Every bench by its name; later ones join here. Each is loaded when it runs, so that none carries the memory of another. */
const benches: Readonly<Record<string, () => Promise<BenchLine[]>>> = {
  'route-check': async () => (await import('./route-check')).routeCheck(),
  verdicts: async () => (await import('./verdicts')).verdicts(),
};

/** `npm run bench [-- name …]`: prints one JSON object a line and nothing else on stdout. */
async function main(): Promise<void> {
  const asked = process.argv.slice(2);
  const unknown = asked.filter((name) => !(name in benches));
  if (unknown.length > 0)
    throw new Error(
      `No bench is called ${unknown.join(', ')}. There are: ${Object.keys(benches).join(', ')}.`,
    );
  for (const [name, bench] of Object.entries(benches)) {
    if (asked.length > 0 && !asked.includes(name)) continue;
    for (const line of await bench()) process.stdout.write(`${JSON.stringify(line)}\n`);
  }
}

main().then(
  () => process.exit(0),
  (error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
    process.exit(1);
  },
);
