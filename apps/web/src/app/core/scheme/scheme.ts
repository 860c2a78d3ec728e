import { effect, Injectable, signal } from '@angular/core';

export type SchemeChoice = 'system' | 'light' | 'dark';

const place = 'tw.scheme';
const choices: readonly SchemeChoice[] = ['system', 'light', 'dark'];

/** Light or dark: as the system has it, unless the person chose. Kept on the device, not a secret. */
@Injectable({ providedIn: 'root' })
export class Scheme {
  readonly choice = signal<SchemeChoice>(kept());

  constructor() {
    effect(() => {
      const choice = this.choice();
      document.documentElement.dataset['scheme'] = choice;
      try {
        if (choice === 'system') localStorage.removeItem(place);
        else localStorage.setItem(place, choice);
      } catch {
        // Not kept for the next visit; this one has it.
      }
    });
  }
}

function kept(): SchemeChoice {
  try {
    const value = localStorage.getItem(place) as SchemeChoice | null;
    return value && choices.includes(value) ? value : 'system';
  } catch {
    return 'system';
  }
}
