// Bundles the command and the library into dist/ and emits declarations. Bundling is for start-up: importing mathjs file by file takes over a
// second, the part of it in use about 50 ms. Each command's code stays in chunks of its own, loaded when it is used.
import { execFileSync } from 'node:child_process';
import { chmodSync, rmSync } from 'node:fs';
import { createRequire } from 'node:module';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const root = fileURLToPath(new URL('..', import.meta.url));
process.chdir(root);
rmSync('dist', { recursive: true, force: true });

await build({
  entryPoints: { index: 'src/index.ts', 'cli/main': 'src/cli/main.ts' },
  outdir: 'dist',
  bundle: true,
  splitting: true,
  minifySyntax: true,
  minifyWhitespace: true,
  format: 'esm',
  platform: 'node',
  target: 'node20',
  chunkNames: 'chunks/[name]-[hash]',
  // Native code and data files cannot be bundled.
  external: ['canvas', 'chartjs-node-canvas', 'dejavu-fonts-ttf'],
  // CommonJS packages inside the bundle ask for built-in modules by require.
  banner: {
    js: "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);",
  },
  logLevel: 'warning',
});
chmodSync('dist/cli/main.js', 0o755);

const compiler = createRequire(import.meta.url).resolve('typescript/bin/tsc');
execFileSync(process.execPath, [compiler, '-p', 'tsconfig.build.json'], { stdio: 'inherit' });
