import { Pipe, type PipeTransform } from '@angular/core';

/**
 * What each value of the contracts' enumerations is called on screen. Only values whose word is not
 * simply the value with spaces stand here.
 */
const words: Readonly<Record<string, string>> = {
  shop_error: 'our own mistake',
  put_right: 'put right',
  made_safe: 'made safe',
  client_owner: 'client owner',
  shop_owner: 'shop owner',
  platform_admin: 'platform admin',
  late_charge: 'late charge',
  past_due: 'past due',
  in_process: 'in process',
  none: 'no',
  wont_start: 'won’t start',
  wont_fill: 'won’t fill',
  wont_drain: 'won’t drain',
  wont_heat: 'won’t heat',
  wont_turn: 'won’t turn',
  wont_spin: 'won’t spin',
  wont_lock: 'won’t lock',
  wont_open: 'won’t open',
};

/** `locked_out` is called "locked out". */
export function wordFor(value: string): string {
  return words[value] ?? value.replaceAll('_', ' ');
}

/** The word with a capital, for where it begins a line: "Locked out". */
export function labelFor(value: string): string {
  const word = wordFor(value);
  return word.charAt(0).toUpperCase() + word.slice(1);
}

/** "1 machine", "3 machines". */
export function counted(count: number, one: string, many = `${one}s`): string {
  return `${count} ${count === 1 ? one : many}`;
}

@Pipe({ name: 'twWord' })
export class WordPipe implements PipeTransform {
  transform(value: string): string {
    return wordFor(value);
  }
}

@Pipe({ name: 'twLabel' })
export class LabelPipe implements PipeTransform {
  transform(value: string): string {
    return labelFor(value);
  }
}
