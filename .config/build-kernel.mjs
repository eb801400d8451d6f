// Compiles the shipping kernel (AssemblyScript → WebAssembly with 128-bit vectors) into a module that holds its bytes, so
// that browser, worker, Node and tests load it alike. Never with relaxed vectors: the results must be the same bits
// everywhere.
import { readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import asc from 'assemblyscript/asc';
import { giveUp, kernelBytes, kernelSource, root } from './lib/shell.mjs';

let wasm;
const options = ['-O3', '--runtime', 'stub', '--enable', 'simd', '--noAssert'];
// 112: exported functions of vectors; only modules of this folder call them.
const { error, stderr } = await asc.main(
  ['index.ts', ...options, '--disableWarning', '112', '--outFile', 'kernel.wasm'],
  {
    readFile: (name) => {
      try {
        return readFileSync(join(root, kernelSource, name), 'utf8');
      } catch {
        return null;
      }
    },
    writeFile: (_name, contents) => {
      wasm = contents;
    },
    listFiles: () => readdirSync(join(root, kernelSource)),
  },
);
if (error) giveUp(`The kernel does not compile: ${error.message}\n${stderr.toString()}`);
writeFileSync(
  join(root, kernelBytes),
  `/** The kernel of \`assembly/\`, compiled by \`.config/build-kernel.mjs\`; base64. */\nexport const kernelBytes =\n  '${Buffer.from(wasm).toString('base64')}';\n`,
);
