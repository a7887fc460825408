import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';

import { root } from './root';

const kept = 400;
const patience = 8_000;

/** A running program whose last words are kept. */
export interface Program {
  name: string;
  child: ChildProcess;
  words(): string;
  stop(): Promise<void>;
}

/** Starts `node ...args`; nothing of it outlives this process. */
export function launch(name: string, args: readonly string[], env: Record<string, string>): Program {
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: { ...process.env, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const lines: string[] = [];
  for (const stream of [child.stdout, child.stderr]) {
    stream.setEncoding('utf8').on('data', (text: string) => {
      lines.push(...text.split('\n').filter(Boolean));
      lines.splice(0, Math.max(0, lines.length - kept));
    });
  }
  const kill = () => child.kill('SIGKILL');
  process.once('exit', kill);
  const ended = once(child, 'exit');
  void ended.then(() => process.off('exit', kill));
  return {
    name,
    child,
    words: () => lines.join('\n'),
    async stop() {
      if (child.exitCode !== null || child.signalCode !== null) return;
      const late = setTimeout(kill, patience);
      child.kill('SIGTERM');
      await ended;
      clearTimeout(late);
    },
  };
}

/** Runs a program to its end; throws with its last words when that is not a good one. */
export async function finish(program: Program): Promise<void> {
  const [code] = (await once(program.child, 'close')) as [number | null];
  if (code !== 0)
    throw new Error(`${program.name} ended with ${code}:\n${program.words().split('\n').slice(-20).join('\n')}`);
}

/** Waits until the address answers well; throws with the program's last words when it ends first or takes too long. */
export async function answering(program: Program, url: string, milliseconds = 30_000): Promise<void> {
  const end = Date.now() + milliseconds;
  while (Date.now() < end && program.child.exitCode === null) {
    const response = await fetch(url).catch(() => null);
    if (response?.ok) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error(`${program.name} does not answer at ${url}:\n${program.words().split('\n').slice(-20).join('\n')}`);
}
