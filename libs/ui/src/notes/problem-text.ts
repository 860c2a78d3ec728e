/** What a failure says to a person: a problem document's own words, else that there was no answer. */
export function problemText(problem: unknown): string {
  if (typeof problem === 'object' && problem !== null) {
    const { detail, title } = problem as { detail?: unknown; title?: unknown };
    if (typeof detail === 'string' && detail) return detail;
    if (typeof title === 'string' && title) return title;
  }
  return 'There was no answer. Check the connection and try again.';
}
