import { ChangeDetectionStrategy, Component, computed, effect, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  type Choice,
  counted,
  EmptyNote,
  floorOf,
  FloorPlan,
  LoadNote,
  PageHead,
  Reading,
  SectionHead,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Confirm } from '../../core/confirm/confirm';
import { OpenForms } from '../../core/forms/open-forms';
import { type HasChanges, warnBeforeUnload } from '../../core/forms/unsaved-changes';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Titles } from '../../core/navigation/titles';
import { Session } from '../../core/session/session';
import { ConditionsSection } from '../conditions/conditions-section';
import { ContactsSection } from '../contacts/contacts-section';
import { MachinesSection } from '../machines/machines-section';
import { BanksSection } from './banks-section';
import { OpenItems } from './open-items';
import { StoreFacts } from './store-facts';
import { StorePhotos } from './store-photos';
import { type Store, StoresApi } from './stores-api';

/** A store: its floor first, then what changes how work is done there, then who and where. */
@Component({
  selector: 'tw-store-page',
  imports: [
    BanksSection,
    ConditionsSection,
    ContactsSection,
    EmptyNote,
    FloorPlan,
    LoadNote,
    MachinesSection,
    MatButton,
    OpenItems,
    PageHead,
    RouterLink,
    SectionHead,
    StoreFacts,
    StorePhotos,
  ],
  providers: [OpenForms],
  templateUrl: './store-page.html',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class StorePage implements HasChanges {
  readonly #api = inject(StoresApi);
  readonly #confirm = inject(Confirm);
  readonly #forms = inject(OpenForms);
  readonly #messages = inject(Messages);
  readonly #reading = inject(Reading);
  readonly #router = inject(Router);
  readonly #titles = inject(Titles);
  protected readonly session = inject(Session);

  readonly storeId = input.required<string>();

  protected readonly store = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#api.show(params),
  });
  protected readonly floor = rxResource({
    params: () => this.storeId(),
    stream: ({ params }) => this.#api.floor(params),
  });
  protected readonly banks = computed(() =>
    this.floor.hasValue()
      ? floorOf(this.floor.value(), {
          locale: this.#reading.locale(),
          zone: this.#reading.zone(),
        })
      : [],
  );
  protected readonly hasMachines = computed(() =>
    this.banks().some((bank) => bank.bays.length > 0),
  );
  protected readonly machineChoices = computed<readonly Choice[]>(() =>
    this.banks().flatMap((bank) => bank.bays.map(({ id, label }) => ({ value: id, label }))),
  );
  protected readonly mayChange = computed(() => this.session.mayChange('clients.change'));
  protected readonly mayChangeMachines = computed(() => this.session.mayChange('machines.change'));

  constructor() {
    warnBeforeUnload(() => this.hasChanges());
    reloadOn(this.store, 'stores', 'machines', 'call', 'visit');
    reloadOn(this.floor, 'stores', 'machines', 'conditions', 'call');
    effect(() => {
      if (this.store.hasValue()) this.#titles.name(this.store.value().name);
    });
  }

  hasChanges(): boolean {
    return this.#forms.hasChanges();
  }

  /** "Alder & Finch · 22 machines · 3 down, 1 degraded" */
  protected sub(store: Store): string {
    const { up, degraded, down, lockedOut } = store.machines;
    const notUp = [
      down ? `${down} down` : '',
      lockedOut ? `${lockedOut} locked out` : '',
      degraded ? `${degraded} degraded` : '',
    ].filter(Boolean);
    const all = counted(up + degraded + down + lockedOut, 'machine');
    const calls = store.openCalls ? [counted(store.openCalls, 'open call')] : [];
    const ended = store.endedAt ? ['ended'] : [];
    return [store.number, store.client.name, all, notUp.join(', '), ...calls, ...ended]
      .filter(Boolean)
      .join(' · ');
  }

  protected openMachine(machineId: string): void {
    void this.#router.navigate(['/shop/machines', machineId]);
  }

  protected print(): void {
    window.print();
  }

  protected async end(store: Store): Promise<void> {
    const { up, degraded, down, lockedOut } = store.machines;
    const agreed = await this.#confirm.ask({
      heading: `Stop working for ${store.name}?`,
      consequence:
        `${counted(up + degraded + down + lockedOut, 'machine')} and ` +
        `${counted(store.openCalls, 'open call')} leave the lists with it. Nothing is lost, and ` +
        'the store can be resumed.',
      action: 'Stop working for it',
      destructive: true,
    });
    if (!agreed) return;
    this.store.set(await firstValueFrom(this.#api.end(store)));
    this.#messages.say(`${store.name} has ended.`);
  }

  protected async resume(store: Store): Promise<void> {
    this.store.set(await firstValueFrom(this.#api.resume(store)));
    this.#messages.say(`${store.name} is worked for again.`);
  }
}
