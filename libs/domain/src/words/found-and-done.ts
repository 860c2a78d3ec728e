/**
 * What was found on a machine and what was done, as one line: sentences of a tech, each without its
 * last full stop or with it, read on as sentences. Ends without a full stop; '' when nothing is said.
 */
export function foundAndDone(...said: readonly (string | null | undefined)[]): string {
  return said
    .map((each) => (each ?? '').trim().replace(/\.$/, ''))
    .filter((each) => each !== '')
    .join('. ');
}
