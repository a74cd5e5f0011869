import { build } from 'esbuild';
import { serverBuild } from './build.mjs';

// A program of its own: esbuild may only be imported once the packages are installed.
await build(serverBuild);
