import { type SetUpFacts } from './set-up-facts';

interface SetUpStep {
  readonly id: string;
  readonly title: string;
  /** Why it matters, or what comes of it. */
  readonly words: string;
  readonly link: string;
  readonly label: string;
  readonly done: boolean;
  /** The shop works without it. */
  readonly optional: boolean;
  /** Another way to the same. */
  readonly other?: { readonly link: string; readonly label: string };
}

/** The steps of setting up a shop, in the order in which each rests on those before. */
export function setUpSteps(facts: SetUpFacts): SetUpStep[] {
  const byFile = { link: '/shop/imports', label: 'Import them from a file' };
  const client = facts.onlyClientId ? `/shop/clients/${facts.onlyClientId}` : '/shop/clients';
  const store = facts.onlyStoreId
    ? `/shop/stores/${facts.onlyStoreId}/machines/several`
    : '/shop/stores';
  return [
    {
      id: 'shop',
      title: 'Say who you are',
      words: 'Name, address and telephone stand on every ticket and statement.',
      link: '/shop/settings',
      label: 'Open the settings',
      done: facts.hasAddress,
      optional: false,
    },
    {
      id: 'prices',
      title: 'Make the price book yours',
      words:
        'You were given prices to start with. Put your own rates, trips, taxes and warranty in ' +
        'their place before the first ticket is signed off.',
      link: '/shop/price-book/new',
      label: 'Write your own edition',
      done: facts.editions > 1,
      optional: true,
    },
    {
      id: 'client',
      title: 'Add your first client',
      words: 'Who owns one or more laundries, and pays.',
      link: '/shop/clients/new',
      label: 'Add a client',
      done: facts.clients > 0,
      optional: false,
      other: byFile,
    },
    {
      id: 'store',
      title: 'Add a store',
      words: 'One laundry at one address, with how to get in.',
      link: '/shop/stores/new',
      label: 'Add a store',
      done: facts.stores > 0,
      optional: false,
      other: byFile,
    },
    {
      id: 'machines',
      title: 'Put its machines on the floor',
      words: 'A whole bank of one model is added in one go.',
      link: store,
      label: facts.onlyStoreId ? 'Add a bank of machines' : 'Choose the store',
      done: facts.machines > 0,
      optional: false,
      other: byFile,
    },
    {
      id: 'contacts',
      title: 'Say who gets the statements',
      words: 'Without an address, a closed month reaches nobody.',
      link: client,
      label: 'Add a contact',
      done: facts.statementContacts > 0,
      optional: false,
    },
    {
      id: 'crew',
      title: 'Invite your crew',
      words: 'Techs get their day on the phone, the office calls and statements.',
      link: '/shop/crew/invite',
      label: 'Invite somebody',
      done: facts.crew > 1,
      optional: true,
    },
    {
      id: 'owner',
      title: 'Invite the client’s owner',
      words: 'They see their machines and visits, and pay without a letter.',
      link: client,
      label: 'Invite the owner',
      done: facts.clientPeople > 0,
      optional: true,
    },
    {
      id: 'cards',
      title: 'Take cards',
      words: 'Statements are paid in a minute, and the balance falls by itself.',
      link: '/shop/settings',
      label: 'Connect card payments',
      done: facts.takesCards,
      optional: true,
    },
  ];
}

/** What to do next: what the shop needs before what it can do without. */
export function nextStep(steps: readonly SetUpStep[]): SetUpStep | undefined {
  const open = steps.filter(({ done }) => !done);
  return open.find(({ optional }) => !optional) ?? open[0];
}
