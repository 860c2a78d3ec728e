import { type Energy, type MachineKind } from '@lib/contracts';

/** The demo's world. Everybody and everything in it is invented. */
export interface ShopPlan {
  name: string;
  zone: string;
  currency: string;
  locale: string;
  planCode: string;
  address: string;
  taxNumber: string;
  phone: string;
  closeBySchedule: boolean;
  taxPlace: string;
  /** Sales tax on labour and parts, in basis points. */
  taxes: { kind: 'labour' | 'part' | 'trip' | 'access' | 'fee'; basisPoints: number }[];
  crew: { role: 'shop_owner' | 'office' | 'tech'; name: string; initials: string; van: string }[];
  clients: ClientPlan[];
}

export interface ClientPlan {
  name: string;
  owner: string;
  taxExempt?: boolean;
  stores: StorePlan[];
}

export interface StorePlan {
  name: string;
  address: string;
  accessWords: string;
  attendant: string;
  banks: {
    letter: string;
    words: string;
    kind: MachineKind;
    energy: Energy;
    make: number;
    machines: number;
  }[];
  /** How many visits a month it takes to keep it earning. */
  visitsAMonth: number;
  /** How its statements are paid. */
  pays: 'at once' | 'late' | 'never';
  conditions: {
    kind: 'access' | 'supply' | 'hazard';
    /** Of one machine; else of the whole store. */
    bay?: string;
    words: string;
    extraMinutes: number;
    tool: string;
  }[];
  contract?: 'labour' | 'everything';
}

const tops = (letter: string, machines: number, make = 0) =>
  ({
    letter,
    words: 'along the window',
    kind: 'top_loader',
    energy: 'electric',
    make,
    machines,
  }) as const;
const fronts = (letter: string, machines: number, make = 1) =>
  ({
    letter,
    words: 'middle row',
    kind: 'front_loader',
    energy: 'electric',
    make,
    machines,
  }) as const;
const dryers = (letter: string, machines: number, make = 2) =>
  ({ letter, words: 'back wall', kind: 'dryer', energy: 'gas', make, machines }) as const;
const stacks = (letter: string, machines: number, make = 3) =>
  ({ letter, words: 'back wall', kind: 'stacked_pair', energy: 'gas', make, machines }) as const;

/** Makers and their models; numbers above are places in this list. */
export const makers = [
  { make: 'Kestrel', models: ['TL-9', 'TL-7'] },
  { make: 'Tarnwick', models: ['F40', 'F60'] },
  { make: 'Quillon', models: ['Dry 30', 'Dry 50'] },
  { make: 'Ossel', models: ['Twin 45'] },
];

export const brackwater: ShopPlan = {
  name: 'Brackwater Appliance Works',
  zone: 'America/Chicago',
  currency: 'USD',
  locale: 'en-US',
  planCode: 'workshop',
  address: '3 Sawpit Yard\nBrackwater',
  taxNumber: 'BW-40-1177',
  phone: '+1 555 0100',
  closeBySchedule: false,
  taxPlace: 'BW',
  taxes: [
    { kind: 'labour', basisPoints: 0 },
    { kind: 'part', basisPoints: 725 },
    { kind: 'fee', basisPoints: 725 },
  ],
  crew: [
    { role: 'shop_owner', name: 'Odile Brandvold', initials: 'OB', van: '' },
    { role: 'office', name: 'Wen Tallis', initials: 'WT', van: '' },
    { role: 'tech', name: 'Imre Kovalik', initials: 'IK', van: 'Van 1' },
    { role: 'tech', name: 'Salma Irigoyen', initials: 'SI', van: 'Van 2' },
    { role: 'tech', name: 'Tobias Ekwall', initials: 'TE', van: 'Van 3' },
    { role: 'tech', name: 'Noor Hadley', initials: 'NH', van: 'Van 4' },
    { role: 'tech', name: 'Pavel Strand', initials: 'PS', van: 'Van 5' },
  ],
  clients: [
    {
      name: 'Alder & Finch Laundries',
      owner: 'Marguerite Alder',
      stores: [
        {
          name: 'Foxglove Lane',
          address: '14 Foxglove Lane\nBrackwater',
          attendant: 'Noa Pell',
          accessWords: 'Side door, ask for Noa. The key of the back room hangs behind the changer.',
          banks: [tops('A', 9), fronts('B', 6), dryers('C', 7)],
          visitsAMonth: 5,
          pays: 'at once',
          conditions: [
            {
              kind: 'access',
              words: 'Folding table shuts in bank A: two people',
              extraMinutes: 20,
              tool: 'long bar',
            },
            {
              kind: 'hazard',
              bay: 'A-06',
              words: 'Makeshift lead: do not energise it; a licensed electrician decides',
              extraMinutes: 0,
              tool: '',
            },
          ],
        },
        {
          name: 'Orchard Court',
          address: '2 Orchard Court\nBrackwater',
          attendant: 'Greta Moll',
          accessWords: 'Shut till noon on Thursdays.',
          banks: [tops('A', 10), dryers('B', 8)],
          visitsAMonth: 3,
          pays: 'at once',
          conditions: [],
          contract: 'labour',
        },
        {
          name: 'Tanner Street',
          address: '77 Tanner Street\nBrackwater',
          attendant: 'Ivo Lund',
          accessWords: 'Ring twice; the shutter is electric.',
          banks: [tops('A', 8), fronts('B', 8), dryers('C', 8)],
          visitsAMonth: 3,
          pays: 'late',
          conditions: [
            { kind: 'supply', words: 'Water main is slow before 9:00', extraMinutes: 0, tool: '' },
          ],
          contract: 'everything',
        },
      ],
    },
    {
      name: 'Quayside Wash Company',
      owner: 'Desmond Achterberg',
      stores: [
        {
          name: 'Quay 9',
          address: '9 Harbour Quay\nSelmouth',
          attendant: 'Yusra Dane',
          accessWords: 'Park on the quay; the alarm is set after 21:00.',
          banks: [tops('A', 12), fronts('B', 8), stacks('C', 8)],
          visitsAMonth: 6,
          pays: 'never',
          conditions: [
            {
              kind: 'access',
              words: 'Machines stand a hand apart; pull out with the strap',
              extraMinutes: 15,
              tool: 'strap',
            },
          ],
        },
        {
          name: 'Beacon Road',
          address: '120 Beacon Road\nSelmouth',
          attendant: 'Luka Fenn',
          accessWords: 'Key with the baker next door.',
          banks: [tops('A', 10), dryers('B', 9)],
          visitsAMonth: 3,
          pays: 'late',
          conditions: [],
        },
        {
          name: 'Lantern Steps',
          address: '5 Lantern Steps\nSelmouth',
          attendant: 'Rhea Corbin',
          accessWords: 'Eleven steps down: bring the trolley.',
          banks: [fronts('A', 10), stacks('B', 8)],
          visitsAMonth: 3,
          pays: 'at once',
          conditions: [
            {
              kind: 'hazard',
              words: 'Floor drain backs up: water stands near the sockets of bank A',
              extraMinutes: 10,
              tool: 'wet vacuum',
            },
          ],
        },
      ],
    },
    {
      name: 'Saint Ebba Community Laundry',
      owner: 'Philippa Okonjo-Lindqvist',
      taxExempt: true,
      stores: [
        {
          name: 'Mill Row',
          address: '31 Mill Row\nBrackwater',
          attendant: 'Jonas Wick',
          accessWords: 'Porter at the gate from 7:00.',
          banks: [tops('A', 12), dryers('B', 12)],
          visitsAMonth: 4,
          pays: 'at once',
          conditions: [],
        },
        {
          name: 'Cooper Green',
          address: '8 Cooper Green\nBrackwater',
          attendant: 'Tamsin Rye',
          accessWords: 'Open all night; best before 8:00.',
          banks: [tops('A', 14), fronts('B', 6), dryers('C', 7)],
          visitsAMonth: 3,
          pays: 'at once',
          conditions: [],
        },
      ],
    },
  ],
};

const lindental: ShopPlan = {
  name: 'Hausgerätewerkstatt Lindental',
  zone: 'Europe/Vienna',
  currency: 'EUR',
  locale: 'de-AT',
  planCode: 'bench',
  address: 'Werkgasse 4\nLindental',
  taxNumber: 'LT-0042-7',
  phone: '+43 000 1234',
  closeBySchedule: true,
  taxPlace: 'LT',
  taxes: [
    { kind: 'labour', basisPoints: 2000 },
    { kind: 'trip', basisPoints: 2000 },
    { kind: 'access', basisPoints: 2000 },
    { kind: 'part', basisPoints: 2000 },
    { kind: 'fee', basisPoints: 2000 },
  ],
  crew: [
    { role: 'shop_owner', name: 'Leopoldine Hrastnik', initials: 'LH', van: '' },
    { role: 'office', name: 'Emil Zauner', initials: 'EZ', van: '' },
    { role: 'tech', name: 'Branka Wiesinger', initials: 'BW', van: 'Bus 1' },
  ],
  clients: [
    {
      name: 'Selbstbedienungswäschereien Morgentau',
      owner: 'Anneliese Perschke',
      stores: [
        {
          name: 'Kastanienplatz',
          address: 'Kastanienplatz 2\nLindental',
          attendant: 'Fritzi Odor',
          accessWords: 'Hintereingang, Schlüssel beim Hauswart.',
          banks: [fronts('A', 8), dryers('B', 6)],
          visitsAMonth: 3,
          pays: 'at once',
          conditions: [],
          contract: 'labour',
        },
        {
          name: 'Am alten Wasserturm',
          address: 'Turmweg 11\nLindental',
          attendant: 'Kolja Renn',
          accessWords: 'Bitte vor 8 Uhr.',
          banks: [fronts('A', 6), stacks('B', 6)],
          visitsAMonth: 2,
          pays: 'at once',
          conditions: [],
        },
      ],
    },
  ],
};

export const shopPlans = [brackwater, lindental];
