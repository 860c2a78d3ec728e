import { Advice } from '../bootstrap/progress.cjs';

/** A slip of the keys must not pass for a demo that was grown. */
export function checkArguments(args: readonly string[]): void {
  const [name, count, ...more] = args;
  if (name === undefined) return;
  if (name === '--shops' && /^[1-9][0-9]{0,4}$/.test(count ?? '') && more.length === 0) return;
  throw new Advice(
    `The demo does not understand "${args.join(' ')}".`,
    'Say how many shops there are to be in all: npm run demo -- --shops 200',
  );
}
