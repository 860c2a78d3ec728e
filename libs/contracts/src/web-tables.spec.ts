import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { webTables } from './web-tables';

describe('the tables the browser takes', () => {
  it.each(Object.entries(webTables()))('%s is what the contracts say now', (name, text) => {
    expect(readFileSync(join(__dirname, 'generated', name), 'utf8')).toBe(text);
  });
});
