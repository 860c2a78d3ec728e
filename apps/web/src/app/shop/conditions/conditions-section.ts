import { ChangeDetectionStrategy, Component, computed, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import {
  Callout,
  type Choice,
  counted,
  InstantPipe,
  LabelPipe,
  LoadNote,
  SectionHead,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { reloadOn } from '../../core/live/reload-on';
import { Messages } from '../../core/messages/messages';
import { Session } from '../../core/session/session';
import { ConditionForm } from './condition-form';
import { type Condition, ConditionsApi } from './conditions-api';

/** What changes how work is done at a store, or at one machine of it. */
@Component({
  selector: 'tw-conditions-section',
  imports: [Callout, ConditionForm, InstantPipe, LabelPipe, LoadNote, MatButton, SectionHead],
  templateUrl: './conditions-section.html',
  styles: `
    tw-callout {
      margin-block-end: 0.5rem;
    }
    .line {
      display: flex;
      flex-wrap: wrap;
      align-items: baseline;
      gap: 0.25rem 1rem;
    }
    .words {
      flex: 1 1 14rem;
      overflow-wrap: anywhere;
    }
    .facts {
      color: var(--tw-soft);
      font-size: 0.875rem;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConditionsSection {
  readonly #api = inject(ConditionsApi);
  readonly #messages = inject(Messages);
  readonly #session = inject(Session);

  readonly storeId = input.required<string>();
  /** Only those of this machine. */
  readonly machineId = input<string>();
  readonly machines = input<readonly Choice[]>([]);

  protected readonly all = rxResource({
    params: () => ({ storeId: this.storeId(), show: this.withCleared() ? 'all' : 'open' }) as const,
    stream: ({ params }) => this.#api.list(params.storeId, params.show),
  });
  protected readonly withCleared = signal(false);
  protected readonly shown = computed(() => {
    const items = this.all.hasValue() ? this.all.value().items : [];
    const machineId = this.machineId();
    return machineId ? items.filter(({ machine }) => machine?.id === machineId) : items;
  });
  /** The id of the condition whose form stands open; `new` for one to be noted. */
  protected readonly open = signal<string | undefined>(undefined);
  protected readonly mayChange = computed(() => this.#session.mayChange('machines.change'));

  constructor() {
    reloadOn(this.all, 'conditions');
  }

  protected tone({ kind, clearedAt }: Condition): 'plain' | 'waiting' | 'alarm' {
    if (clearedAt) return 'plain';
    return kind === 'hazard' ? 'alarm' : 'waiting';
  }

  /** "adds 20 min, bring the long bar" */
  protected facts({ extraMinutes, tool }: Condition): string {
    return [extraMinutes ? `adds ${extraMinutes} min` : '', tool ? `bring ${tool}` : '']
      .filter(Boolean)
      .join(', ');
  }

  protected saved(condition: Condition): void {
    this.open.set(undefined);
    this.all.reload();
    const where = condition.machine ? ` of ${condition.machine.bay}` : '';
    this.#messages.say(`The condition${where} is shown to techs before they set out.`);
  }

  protected async clear(condition: Condition): Promise<void> {
    await firstValueFrom(this.#api.clear(condition));
    this.all.reload();
    this.#messages.say(`"${condition.words}" is no more.`);
  }

  protected clearedWord(): string {
    const cleared = this.shown().filter(({ clearedAt }) => clearedAt).length;
    return this.withCleared() ? `Hide ${counted(cleared, 'cleared one')}` : 'Show cleared ones';
  }
}
