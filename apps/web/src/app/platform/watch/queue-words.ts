const words: Readonly<Record<string, string>> = {
  sweep: 'What fell due',
  'statements-build': 'Statements to build',
  'statements-render': 'Statements to lay out',
  'deliveries-send': 'Mails of shops',
  'platform-mails-send': 'Mails of sign-in and the platform',
  'stripe-event': 'Card events',
  'rounds-plan': 'Rounds to plan',
  'import-work': 'Imports',
  'warranty-absorb': 'Costs borne by shops',
};

/** What the work in a queue is; a queue not known here goes by its name in the logs. */
export function queueWords(queue: string): string {
  return words[queue] ?? queue;
}
