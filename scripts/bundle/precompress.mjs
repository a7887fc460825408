import { readdir, readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { promisify } from 'node:util';
import { brotliCompress, constants, gzip } from 'node:zlib';

const kinds = /\.(js|css|html|svg|json|webmanifest|ttf|map)$/;
const smallest = 1000;

async function one(file) {
  const bytes = await readFile(file);
  const [br, gz] = await Promise.all([
    promisify(brotliCompress)(bytes, {
      params: { [constants.BROTLI_PARAM_QUALITY]: 11, [constants.BROTLI_PARAM_SIZE_HINT]: bytes.length },
    }),
    promisify(gzip)(bytes, { level: 9 }),
  ]);
  await Promise.all([writeFile(`${file}.br`, br), writeFile(`${file}.gz`, gz)]);
  return { raw: bytes.length, gzip: gz.length, brotli: br.length };
}

/**
 * Writes name.br and name.gz beside every text and font file over 1 kB, so that the server compresses nothing while it answers.
 * Answers the sizes in bytes, largest first.
 */
export async function precompress(dir) {
  const entries = await readdir(dir, { recursive: true, withFileTypes: true });
  const files = entries.filter((entry) => entry.isFile() && kinds.test(entry.name));
  const sizes = [];
  for (const entry of files) {
    const file = path.join(entry.parentPath, entry.name);
    if ((await readFile(file)).length < smallest) continue;
    sizes.push({ name: path.relative(dir, file), ...(await one(file)) });
  }
  return sizes.sort((a, b) => b.raw - a.raw);
}
