import { createHash } from 'node:crypto';
import { type PlannedRow } from './planned-row';

/** A hash of what the rows would do, so that what is applied is what the person was shown. */
export function planDigest() {
  const hash = createHash('sha256');
  return {
    add: (row: PlannedRow) => {
      hash.update(JSON.stringify([row.row, row.outcome, row.label, row.errors, row.changes]));
    },
    value: () => hash.digest('hex'),
  };
}
