/** How an instant that may be missing stands in an answer. */
export function instantOrNull(value: Date | null): string | null {
  return value?.toISOString() ?? null;
}
