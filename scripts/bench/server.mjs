/**
 * The API while a job runs: latency of small requests with nothing else going on and while a large expansion is computed and
 * stored by the same server, taken one after the other in one run.
 */
import { ended, expand, PHI4, signUp, startServer } from './lib/server.mjs';

const ORDER = Number(process.env.ORDER ?? 10);
const PAUSE_MS = 10;
const QUIET_REQUESTS = 300;

const server = await startServer();
const cookie = await signUp(server.base);

const requests = [
  () => fetch(`${server.base}/api/v1/models`, { headers: { cookie } }),
  () => fetch(`${server.base}/readyz`),
  () =>
    fetch(`${server.base}/api/v1/models/preview`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', origin: server.base, cookie },
      body: JSON.stringify({ lagrangian: PHI4 }),
    }),
];

/** Milliseconds of requests sent one after the other while `going` says so. */
async function latencies(going) {
  const times = [];
  for (let n = 0; going(n); n++) {
    const started = performance.now();
    await (await requests[n % requests.length]()).text();
    times.push(performance.now() - started);
    await new Promise((resolve) => setTimeout(resolve, PAUSE_MS));
  }
  return times.sort((a, b) => a - b);
}

const at = (times, share) => times[Math.min(times.length - 1, Math.floor(times.length * share))];
const row = (name, times) =>
  console.log(
    `  ${name.padEnd(22)} p50 ${at(times, 0.5).toFixed(1)} ms   p99 ${at(times, 0.99).toFixed(1)} ms   of ${times.length} requests`,
  );

await latencies((n) => n < 60);
const quiet = await latencies((n) => n < QUIET_REQUESTS);
const started = performance.now();
const { id } = await expand(server.base, cookie, { legs: [], order: { lambda: ORDER } });
let record = null;
ended(server.base, cookie, id).then((end) => {
  record = end;
});
const busy = await latencies(() => record === null);
console.log(
  `φ⁴ vacuum, order ${ORDER}: ${record.state}, ${record.summary?.classes} diagrams stored in ${((performance.now() - started) / 1000).toFixed(1)} s`,
);
row('nothing else going on', quiet);
row('while the job runs', busy);
console.log(`  ratio of p99           ${(at(busy, 0.99) / at(quiet, 0.99)).toFixed(1)}   (goal: p99 under 50 ms)`);
await server.stop();
