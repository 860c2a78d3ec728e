import { passwordVerdict } from '@lib/domain';
import { invalid } from '../../core/problems/problem';

/** Refuses a new password that would be guessed early, in words that help to choose another. */
export function demandGoodPassword(password: string, known: (string | undefined)[]): void {
  const words = ['Tumblewright', ...known.filter((word) => word !== undefined)];
  const verdict = passwordVerdict(password, words);
  if (verdict.acceptable) return;
  throw invalid(
    verdict.problems.map((found) => ({ pointer: '/password', in: 'body', detail: found.words })),
  );
}
