const place = 'tw.unsent';

/**
 * How many entries of each membership wait on this device to be sent. Kept beside the entries
 * themselves, so that sign-out can name a loss without loading the area that keeps them.
 */
export const unsent = {
  note(membershipId: string, count: number): void {
    const counts = { ...read(), [membershipId]: count };
    try {
      localStorage.setItem(place, JSON.stringify(counts));
    } catch {
      // Where nothing may be kept, nothing waits either.
    }
  },

  count(): number {
    return Object.values(read()).reduce((sum, count) => sum + count, 0);
  },

  forget(): void {
    try {
      localStorage.removeItem(place);
    } catch {
      // As above.
    }
  },
};

function read(): Record<string, number> {
  try {
    return JSON.parse(localStorage.getItem(place) ?? '{}') as Record<string, number>;
  } catch {
    return {};
  }
}
