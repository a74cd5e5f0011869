import { build } from 'esbuild';
import { join } from 'node:path';

const root = join(import.meta.dirname, '../..');

/** Bundles the plant once for all workers. */
export default async function buildPlant(): Promise<void> {
  await build({
    absWorkingDir: root,
    entryPoints: { plant: 'tests/e2e/plant.ts' },
    outdir: '.build/e2e',
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    packages: 'external',
    tsconfig: 'tsconfig.node.json',
    logLevel: 'warning',
  });
}
