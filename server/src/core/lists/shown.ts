/** The condition for `show`: rows that stand, rows that ended, or both. */
export function shown(show: 'current' | 'ended' | 'all', column: string): string[] {
  if (show === 'all') return [];
  return [`${column} is ${show === 'ended' ? 'not ' : ''}null`];
}
