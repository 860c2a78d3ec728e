import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { InstantPipe, labelFor, LoadNote, MachineGlyph, PageHead, wordFor } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { ConditionsSection } from '../conditions/conditions-section';
import { MachineFacts } from './machine-facts';
import { MachineHistory } from './machine-history';
import { type Machine, MachinesApi } from './machines-api';
import { MoveForm } from './move-form';
import { StateForm } from './state-form';

/** A machine: how it is, what is known of it, what changes work on it, what was done to it. */
@Component({
  selector: 'tw-machine-page',
  imports: [
    ConditionsSection,
    InstantPipe,
    LoadNote,
    MachineFacts,
    MachineGlyph,
    MachineHistory,
    MatButton,
    MoveForm,
    PageHead,
    RouterLink,
    StateForm,
  ],
  providers: [OpenForms],
  templateUrl: './machine-page.html',
  styles: `
    .now {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 1rem 1.5rem;
    }
    tw-machine-glyph {
      --tw-glyph: 3.5rem;
    }
    .state {
      flex: 1 1 12rem;
    }
    .state p {
      margin: 0;
    }
    .word {
      font-size: 1.25rem;
      font-weight: 600;
    }
    .alarm {
      color: var(--tw-alarm);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MachinePage implements HasChanges {
  readonly #api = inject(MachinesApi);
  readonly #confirm = inject(Confirm);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);
  protected readonly labelFor = labelFor;

  readonly machineId = input.required<string>();

  protected readonly machine = rxResource({
    params: () => this.machineId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly open = signal<'state' | 'move' | undefined>(undefined);
  protected readonly mayChange = computed(() => this.session.mayChange('machines.change'));

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.machine, 'machines', 'visit', 'ticket');
    effect(() => {
      if (!this.machine.hasValue()) return;
      const { bay, store } = this.machine.value();
      this.#titles.name(`${bay}, ${store.name}`);
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  /** "Kestrel TL-9 · top loader, electric · serial 4471" */
  protected sub({ make, model, kind, energy, serial }: Machine): string {
    const name = [make, model].filter(Boolean).join(' ');
    const what = `${wordFor(kind)}, ${wordFor(energy)}`;
    return [name, what, serial ? `serial ${serial}` : ''].filter(Boolean).join(' · ');
  }

  protected stateSet(machine: Machine): void {
    this.open.set(undefined);
    this.machine.set(machine);
    this.#messages.say(`${machine.bay} is noted as ${wordFor(machine.state)}.`);
  }

  protected moved(machine: Machine): void {
    this.open.set(undefined);
    this.machine.set(machine);
    this.#messages.say(`The machine stands in ${machine.bay} of ${machine.store.name} now.`);
  }

  protected async retire(machine: Machine): Promise<void> {
    const agreed = await this.#confirm.ask({
      heading: `Retire ${machine.bay}?`,
      consequence:
        `It leaves the floor of ${machine.store.name} for good and its bay becomes free. ` +
        `Its ${machine.jobs.length ? 'history stays' : 'data stay'} to be read.`,
      action: 'Retire it',
      destructive: true,
    });
    if (!agreed) return;
    this.machine.set(await firstValueFrom(this.#api.retire(machine, '')));
    this.#messages.say(`${machine.bay} of ${machine.store.name} is retired.`);
  }
}
