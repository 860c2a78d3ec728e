/**
 * Writes what the browser takes from the contracts: where each operation is, what its form fields
 * must hold, and the values of each enumeration. `npm run contracts`; a spec fails while it is stale.
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { webTables } from '../libs/contracts/src/web-tables';

const folder = join(__dirname, '../libs/contracts/src/generated');
mkdirSync(folder, { recursive: true });
for (const [name, text] of Object.entries(webTables())) writeFileSync(join(folder, name), text);
console.log('Wrote libs/contracts/src/generated.');
