import { spawnSync } from 'node:child_process';

/**
 * Runs a shell command and measures the CPU seconds (user + system) of all its processes, start-up included.
 * @throws Error when it fails.
 */
export function cpuOf(command) {
  const timed = `TIMEFORMAT='cpu %U %S'; time { ${command}; }`;
  const { status, stdout, stderr } = spawnSync('bash', ['-o', 'pipefail', '-c', timed], {
    encoding: 'utf8',
    env: { ...process.env, LC_ALL: 'C' },
  });
  if (status !== 0) throw new Error(`${command} ended with exit code ${status}: ${stderr}`);
  const [, user, system] = /cpu ([\d.]+) ([\d.]+)\s*$/.exec(stderr);
  return { seconds: Number(user) + Number(system), stdout, stderr };
}

export function median(values) {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle] : (sorted[middle - 1] + sorted[middle]) / 2;
}
