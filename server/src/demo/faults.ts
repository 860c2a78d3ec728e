import { type Cause, type FindingCode, type MachineKind, type Symptom } from '@lib/contracts';

/** A fault as it is reported, found and put right; `part` is a place in `partPlans`. */
export interface Fault {
  kinds: readonly MachineKind[];
  symptom: Symptom;
  reported: string;
  code: FindingCode;
  category: string;
  found: string;
  cause: Cause;
  action: string;
  part?: string;
  minutes: number;
}

export const partPlans = [
  { number: 'KS-1101', name: 'Inlet valve, double', category: 'valve', unitCost: 1850 },
  { number: 'KS-1140', name: 'Inlet screen', category: 'valve', unitCost: 140, fixedPrice: 450 },
  { number: 'KS-2203', name: 'Door lock', category: 'door', unitCost: 4410 },
  { number: 'KS-2207', name: 'Door hinge', category: 'door', unitCost: 2670 },
  { number: 'KS-2210', name: 'Hinge screw M6', category: 'door', unitCost: 35, fixedPrice: 120 },
  { number: 'TW-3310', name: 'Drain pump', category: 'drain', unitCost: 5230 },
  { number: 'TW-3318', name: 'Drain hose, 1 m', category: 'drain', unitCost: 980 },
  { number: 'TW-4002', name: 'Drive belt', category: 'drive', unitCost: 1190 },
  { number: 'TW-4050', name: 'Bearing set', category: 'drive', unitCost: 8840, scarce: true },
  { number: 'QL-5101', name: 'Gas igniter', category: 'heat', unitCost: 3120 },
  { number: 'QL-5120', name: 'Flame sensor', category: 'heat', unitCost: 1460 },
  { number: 'QL-5160', name: 'Drum roller', category: 'drive', unitCost: 760 },
  { number: 'OS-6010', name: 'Lint screen', category: 'air', unitCost: 1240 },
  { number: 'OS-7001', name: 'Coin acceptor', category: 'payment', unitCost: 6890 },
  { number: 'OS-7044', name: 'Control board', category: 'control', unitCost: 21400, scarce: true },
  {
    number: 'EQ-3310',
    name: 'Drain pump, equivalent',
    category: 'drain',
    unitCost: 1890,
    makersPart: false,
  },
] as const;

const washers = ['top_loader', 'front_loader'] as const;
const allDryers = ['dryer', 'stacked_pair'] as const;
const any = [...washers, ...allDryers] as const;

export const faults: readonly Fault[] = [
  {
    kinds: washers,
    symptom: 'wont_fill',
    reported: 'Fills slowly, then stops',
    code: 'blocked',
    category: 'valve',
    found: 'Inlet valve blocked with grit',
    cause: 'wear',
    action: 'Valve fitted, fill timed',
    part: 'KS-1101',
    minutes: 30,
  },
  {
    kinds: washers,
    symptom: 'wont_drain',
    reported: 'Water stands in the drum',
    code: 'blocked',
    category: 'drain',
    found: 'Coin and hairpins in the pump',
    cause: 'misuse',
    action: 'Pump cleared, drain run twice',
    minutes: 25,
  },
  {
    kinds: washers,
    symptom: 'wont_drain',
    reported: 'Hums and does not drain',
    code: 'seized',
    category: 'drain',
    found: 'Pump seized',
    cause: 'age',
    action: 'Pump fitted, full cycle run',
    part: 'TW-3310',
    minutes: 40,
  },
  {
    kinds: ['front_loader'],
    symptom: 'wont_lock',
    reported: 'Door will not lock',
    code: 'worn',
    category: 'door',
    found: 'Lock worn, latch does not hold',
    cause: 'wear',
    action: 'Door lock fitted, hinge set straight',
    part: 'KS-2203',
    minutes: 35,
  },
  {
    kinds: ['front_loader'],
    symptom: 'leaks',
    reported: 'Water on the floor in front',
    code: 'misaligned',
    category: 'door',
    found: 'Hinge loose, door sits crooked',
    cause: 'wear',
    action: 'Hinge fitted and set',
    part: 'KS-2207',
    minutes: 35,
  },
  {
    kinds: washers,
    symptom: 'wont_spin',
    reported: 'Clothes come out wet',
    code: 'worn',
    category: 'drive',
    found: 'Belt worn smooth',
    cause: 'wear',
    action: 'Belt fitted, spin tested',
    part: 'TW-4002',
    minutes: 25,
  },
  {
    kinds: washers,
    symptom: 'noisy',
    reported: 'Rumbles when it spins',
    code: 'worn',
    category: 'drive',
    found: 'Bearings worn',
    cause: 'age',
    action: 'Bearing set fitted, two people',
    part: 'TW-4050',
    minutes: 110,
  },
  {
    kinds: allDryers,
    symptom: 'wont_heat',
    reported: 'Blows cold',
    code: 'broken',
    category: 'heat',
    found: 'Igniter cracked',
    cause: 'wear',
    action: 'Igniter fitted, flame watched for a full cycle',
    part: 'QL-5101',
    minutes: 35,
  },
  {
    kinds: allDryers,
    symptom: 'wont_heat',
    reported: 'Heats, then stops heating',
    code: 'soiled',
    category: 'heat',
    found: 'Flame sensor sooted',
    cause: 'wear',
    action: 'Sensor fitted',
    part: 'QL-5120',
    minutes: 25,
  },
  {
    kinds: allDryers,
    symptom: 'noisy',
    reported: 'Squeals',
    code: 'worn',
    category: 'drive',
    found: 'Drum rollers flat',
    cause: 'wear',
    action: 'Rollers fitted',
    part: 'QL-5160',
    minutes: 50,
  },
  {
    kinds: allDryers,
    symptom: 'stops_midway',
    reported: 'Stops after ten minutes',
    code: 'blocked',
    category: 'air',
    found: 'Lint in the duct',
    cause: 'misuse',
    action: 'Duct cleared, air flow felt at the roof',
    minutes: 40,
  },
  {
    kinds: any,
    symptom: 'takes_no_payment',
    reported: 'Swallows coins',
    code: 'broken',
    category: 'payment',
    found: 'Coin acceptor levered with a screwdriver',
    cause: 'vandalism',
    action: 'Acceptor fitted, 20 coins tried',
    part: 'OS-7001',
    minutes: 35,
  },
  {
    kinds: any,
    symptom: 'shows_error',
    reported: 'Shows an error and stops',
    code: 'shorted',
    category: 'control',
    found: 'Board shorted by damp',
    cause: 'supply',
    action: 'Board fitted, connector dried and taped',
    part: 'OS-7044',
    minutes: 45,
  },
  {
    kinds: any,
    symptom: 'wont_start',
    reported: 'Dead',
    code: 'loose',
    category: 'control',
    found: 'Plug of the supply lead loose',
    cause: 'installation',
    action: 'Plug seated, cycle run',
    minutes: 15,
  },
];

/** Says that the machine was fine all along. */
export const imagined = [
  'Said not to spin',
  'Said to smell burnt',
  'Said to take too long',
  'Said to be too loud',
];
