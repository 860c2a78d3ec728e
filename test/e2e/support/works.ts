/**
 * The shops the tests work in: copies of the demo's first shop, a different one for each way of
 * looking at it, so that tests run beside each other. Story 4 pauses shops; it has its own.
 */
const numbers: Record<string, { work: number; subscription?: number }> = {
  once: { work: 1 },
  'phone-light': { work: 3, subscription: 7 },
  'phone-dark': { work: 4, subscription: 8 },
  'desktop-light': { work: 5, subscription: 9 },
  'desktop-dark': { work: 6, subscription: 10 },
};

/** How many shops the demo must be grown to. */
export const shopsNeeded = 10;

/** The one password of everybody in the demo. */
export const password = 'tumble-and-wring';

export const platformAdmin = 'admin@tumblewright.example';

export interface Works {
  readonly name: string;
  readonly owner: string;
  readonly office: string;
  readonly tech: string;
  /** Of Alder & Finch Laundries, with Foxglove Lane, Orchard Court and Tanner Street. */
  readonly clientOwner: string;
  /** At Foxglove Lane. */
  readonly attendant: string;
}

export function worksOf(project: string, purpose: 'work' | 'subscription'): Works {
  const number = numbers[project]?.[purpose];
  if (number === undefined) throw new Error(`The project "${project}" has no shop to work in.`);
  // The first is the demo's own.
  const copy = number === 1 ? '' : String(number);
  const at = (name: string) => `${name}@works${copy}.example`;
  return {
    name: `Brackwater Appliance Works ${copy}`.trim(),
    owner: at('odile.brandvold'),
    office: at('wen.tallis'),
    tech: at('imre.kovalik'),
    clientOwner: at('marguerite.alder'),
    attendant: at('noa.pell'),
  };
}
