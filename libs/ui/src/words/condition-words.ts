import { type AnswerOf } from '@lib/contracts/web';
import { minutesText } from '../format/times';

type Condition = Pick<
  AnswerOf<'conditions.list'>['items'][number],
  'id' | 'kind' | 'machine' | 'words' | 'extraMinutes' | 'tool'
>;

interface ConditionWords {
  readonly id: string;
  readonly hazard: boolean;
  readonly words: string;
}

/** "A-06: folding table across. 20 min more. Bring: long bar." */
export function conditionWords(condition: Condition): ConditionWords {
  const { id, kind, machine, words, extraMinutes, tool } = condition;
  const parts = [
    ended(machine ? `${machine.bay}: ${words}` : words),
    extraMinutes > 0 ? `${minutesText(extraMinutes)} more.` : '',
    tool ? ended(`Bring: ${tool}`) : '',
  ];
  return { id, hazard: kind === 'hazard', words: parts.filter(Boolean).join(' ') };
}

function ended(words: string): string {
  return /[.!?]$/.test(words) ? words : `${words}.`;
}
