/** What is reported of a machine, in the words people use; documents print them. */
export const symptomWords = {
  wont_start: 'won’t start',
  wont_fill: 'won’t fill',
  wont_drain: 'won’t drain',
  wont_heat: 'won’t heat',
  wont_turn: 'won’t turn',
  wont_spin: 'won’t spin',
  wont_lock: 'won’t lock',
  wont_open: 'won’t open',
  stops_midway: 'stops midway',
  leaks: 'leaks',
  noisy: 'noisy',
  smells: 'smells',
  takes_no_payment: 'takes no payment',
  shows_error: 'shows error',
  damaged: 'damaged',
  other: 'other',
} as const;

export type SymptomCode = keyof typeof symptomWords;

/** The words for a symptom; nothing for a job that no call was made for. */
export function symptomWord(symptom: string): string {
  return symptomWords[symptom as SymptomCode] ?? symptom;
}
