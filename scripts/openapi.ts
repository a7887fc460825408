/** Prints the interface as an OpenAPI 3.1 document: `npm run openapi --silent [-- file]`. */
import { writeFileSync } from 'node:fs';

import { openApi } from '@/server/openapi';

const file = process.argv[2];
const text = `${JSON.stringify(openApi(process.env.PUBLIC_URL ?? 'http://localhost:4180'), null, 2)}\n`;
if (file) writeFileSync(file, text);
else process.stdout.write(text);
