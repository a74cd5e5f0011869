import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { ensureBuilt } from '../server/tools/build.mjs';
import { root, runCommand } from '../server/tools/environment.mjs';
import { ensureInstalled } from '../server/tools/install.mjs';
import { runQuietly } from '../server/tools/run.mjs';
import { ensureBrowser } from './tools/browser.mjs';

const results = join(root, '.build/results');
const bin = (path) => [process.execPath, [join(root, 'node_modules', path)]];
const program = (path, ...args) => {
  const [node, start] = bin(path);
  return { program: node, args: [...start, ...args] };
};

/** A gate that has no tests of its own counts as one: it passed or it failed. */
const gates = [
  { title: 'format', ...program('prettier/bin/prettier.cjs', '--check', '--log-level', 'warn', '.') },
  { title: 'lint', ...program('eslint/bin/eslint.js', '.', '--max-warnings', '0') },
  {
    title: 'types of server, shared, fakes and tests',
    ...program('typescript/bin/tsc', '--noEmit', '-p', 'tsconfig.node.json'),
  },
  {
    title: 'types of screens and their templates',
    ...program('@angular/compiler-cli/bundles/src/bin/ngc.js', '--noEmit', '-p', 'tsconfig.app.json'),
  },
];

const suites = [
  ...['unit', 'reference', 'api'].map((project) => ({
    title: `${project} tests`,
    ...program(
      'vitest/vitest.mjs',
      'run',
      '--project',
      project,
      '--reporter=default',
      '--reporter=json',
      `--outputFile.json=${join(results, `${project}.json`)}`,
    ),
    count: () => countVitest(project),
  })),
  {
    title: 'component tests',
    ...program('@angular/cli/bin/ng.js', 'test', '--watch=false'),
    count: () => countVitest('component'),
  },
  {
    title: 'end-to-end tests',
    ...program('@playwright/test/cli.js', 'test', '-c', 'tests/e2e/playwright.config.ts'),
    env: { PLAYWRIGHT_JSON_OUTPUT_NAME: join(results, 'e2e.json') },
    count: countPlaywright,
  },
];

/** `npm test`: installs what is missing, runs every gate and suite, and ends with one plain line. */
await runCommand(async () => {
  await ensureInstalled();
  await ensureBrowser();
  await ensureBuilt();
  rmSync(results, { recursive: true, force: true });
  mkdirSync(results, { recursive: true });

  const total = { passed: 0, failed: 0 };
  for (const step of [...gates, ...suites]) {
    const startedAt = performance.now();
    const { code, output } = await runQuietly(step.program, step.args, {
      ...step.env,
      CI: process.env.CI ?? '1',
      FORCE_COLOR: '0',
    });
    const counted = step.count?.() ?? (code === 0 ? { passed: 1, failed: 0 } : { passed: 0, failed: 1 });
    // A suite that broke down outside its tests has failed, whatever it counted.
    if (code !== 0 && counted.failed === 0) counted.failed = 1;
    total.passed += counted.passed;
    total.failed += counted.failed;
    console.log(
      `${step.title}: ${counted.passed} passed, ${counted.failed} failed (${((performance.now() - startedAt) / 1000).toFixed(0)} s)`,
    );
    if (code !== 0) console.log(output);
    else for (const line of figures(output)) console.log(`  ${line}`);
  }
  console.log(`${total.passed} passed, ${total.failed} failed`);
  if (total.failed > 0) process.exitCode = 1;
});

/** Lines by which a test shows what it measured: they begin with "figure:". */
function figures(output) {
  return output
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line.startsWith('figure:'));
}

function countVitest(name) {
  const report = readReport(name);
  return report ? { passed: report.numPassedTests, failed: report.numFailedTests } : { passed: 0, failed: 1 };
}

function countPlaywright() {
  const report = readReport('e2e');
  return report
    ? { passed: report.stats.expected, failed: report.stats.unexpected + report.stats.flaky }
    : { passed: 0, failed: 1 };
}

function readReport(name) {
  try {
    return JSON.parse(readFileSync(join(results, `${name}.json`), 'utf8'));
  } catch {
    return undefined; // the runner died before it wrote its report: counted as a failure by the caller
  }
}
