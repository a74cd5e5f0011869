import { spawn } from 'node:child_process';
import { CannotGoOn, root } from './environment.mjs';

/**
 * Runs a program to its end with its output kept back, and a line that counts the seconds on a terminal.
 * The output is shown only if it fails.
 */
export async function runStep(title, program, args, { env = {}, hint = '' } = {}) {
  const startedAt = performance.now();
  const seconds = () => ((performance.now() - startedAt) / 1000).toFixed(0);
  const onTerminal = process.stdout.isTTY === true;
  if (!onTerminal) console.log(`  ${title} …`);
  const ticking = onTerminal
    ? setInterval(() => process.stdout.write(`\r  ${title} … ${seconds()} s`), 500)
    : undefined;
  const { code, output } = await runQuietly(program, args, env);
  clearInterval(ticking);
  const line = `  ${title}: ${code === 0 ? 'done' : 'FAILED'} (${seconds()} s)`;
  console.log(onTerminal ? `\r${line}      ` : line);
  if (code !== 0)
    throw new CannotGoOn(
      `${output.trim().split('\n').slice(-40).join('\n')}\n\n${title} failed. ${hint}`.trim(),
    );
  return output;
}

/** Runs a program; answers its exit code and everything it printed. */
export function runQuietly(program, args, env = {}) {
  return new Promise((answer, fail) => {
    const child = spawn(program, args, {
      cwd: root,
      env: { ...process.env, ...env },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let output = '';
    child.stdout.on('data', (part) => (output += part));
    child.stderr.on('data', (part) => (output += part));
    child.once('error', fail);
    child.once('close', (code) => answer({ code: code ?? 1, output }));
  });
}
