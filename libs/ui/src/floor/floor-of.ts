import { type AnswerOf } from '@lib/contracts/web';
import { dayIn, dayText } from '../format/times';
import { counted } from '../words/words';
import { type FloorBank } from './floor-bay';

export type StoreFloor = AnswerOf<'stores.floor'>;
type Machine = StoreFloor['banks'][number]['machines'][number];

export interface ReadAs {
  readonly locale: string;
  readonly zone: string;
}

/** The floor of a store as it is drawn: what a person should know of each machine in one line. */
export function floorOf(floor: StoreFloor, readAs: ReadAs): FloorBank[] {
  return floor.banks.map((bank) => ({
    id: bank.id,
    name: bank.words ? `${bank.letter}, ${bank.words}` : bank.letter,
    bays: bank.machines.map((machine) => ({
      id: machine.id,
      label: machine.bay,
      kind: machine.kind,
      state: machine.state,
      note: noteOf(machine, readAs),
    })),
  }));
}

function noteOf(machine: Machine, { locale, zone }: ReadAs): string {
  const since = dayText(dayIn(zone, new Date(machine.stateSince)), locale);
  return [
    [machine.make, machine.model].filter(Boolean).join(' '),
    machine.state === 'up' ? '' : `since ${since}`,
    machine.conditions ? counted(machine.conditions, 'condition') : '',
    machine.openCalls ? counted(machine.openCalls, 'call') : '',
  ]
    .filter(Boolean)
    .join(', ');
}
