import { type FloorBank } from '@lib/ui';
import { type Sheet, type SheetMachine } from '../kept/kept';

/** The floor of the store as the sheet knows it, each machine with what a tech should know of it. */
export function sheetFloor(sheet: Sheet): FloorBank[] {
  const banks = new Map<string, SheetMachine[]>();
  for (const machine of sheet.machines) {
    banks.set(machine.bank.id, [...(banks.get(machine.bank.id) ?? []), machine]);
  }
  return [...banks.values()].map((machines) => {
    const { id, letter, words } = (machines[0] as SheetMachine).bank;
    return {
      id,
      name: words ? `${letter}, ${words}` : letter,
      bays: machines.map((machine) => ({
        id: machine.id,
        label: machine.bay,
        kind: machine.kind,
        state: machine.state,
        note: noteOf(machine, sheet),
      })),
    };
  });
}

function noteOf(machine: SheetMachine, sheet: Sheet): string {
  const called = sheet.calls.some((call) => call.machine?.id === machine.id);
  const worked = sheet.jobs.some((job) => job.machine.id === machine.id);
  return [
    `${machine.make} ${machine.model}`.trim(),
    called ? 'called for' : '',
    worked ? 'on this visit' : '',
  ]
    .filter(Boolean)
    .join(', ');
}
