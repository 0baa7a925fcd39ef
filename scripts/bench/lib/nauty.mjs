import { spawnSync } from 'node:child_process';

const succeeds = (command, args) => spawnSync(command, args, { stdio: 'ignore' }).status === 0;
const present = () => ['nauty-geng', 'nauty-multig'].every((tool) => succeeds('bash', ['-c', `command -v ${tool}`]));

/** Whether nauty's generators of graphs and multigraphs are there; installs them with apt where that is possible. */
export function ensureNauty() {
  if (present()) return true;
  if (process.getuid?.() === 0 && succeeds('bash', ['-c', 'command -v apt-get'])) {
    console.log('Installing nauty (apt-get install nauty) …');
    if (!succeeds('apt-get', ['install', '-y', '-qq', 'nauty'])) {
      succeeds('apt-get', ['update', '-qq']);
      succeeds('apt-get', ['install', '-y', '-qq', 'nauty']);
    }
  }
  return present();
}
