import { ChangeDetectionStrategy, Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { Session } from '../../core/session/session';
import { MoneyText } from '@lib/ui/format/money-text';
import { StateMark } from '@lib/ui/machine-glyph/state-mark';
import { NearDayPipe, NearInstantPipe } from '../near-day';
import { type Still } from './next-steps';
import { machineStanding } from './step-words';

/** The machines that take no money now: since when, who is on the way, and what it costs. */
@Component({
  selector: 'tw-still-list',
  imports: [MoneyText, NearDayPipe, NearInstantPipe, RouterLink, StateMark],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <ul>
      @for (one of machines(); track one.machine.id) {
        <li>
          <tw-state-mark [state]="one.machine.state" />
          <div>
            <p>
              <a [routerLink]="['/client/machines', one.machine.id]">{{
                standing(one.machine)
              }}</a>, {{ one.machine.store.name }}
            </p>
            @for (words of waitsFor(one.machine.id); track words) {
              <p>{{ words }}</p>
            }
            <p class="tw-soft">
              Since {{ one.machine.stateSince | twNearInstant: 'within' }}.
              @if (one.visit; as visit) {
                A visit comes: {{ visit.plannedOn | twNearDay: 'within' }}.
              } @else {
                No visit is planned yet.
              }
              @if (one.missed > 0) {
                Takings missed so far, about <tw-money [amount]="one.missed" />.
              }
            </p>
            @if (!one.visit && !one.called && session.mayChange('calls.report')) {
              <p>
                <a
                  routerLink="/client/calls/new"
                  [queryParams]="{ store: one.machine.store.id, machine: one.machine.id }"
                  >Ask the shop to come for {{ one.machine.bay }}</a
                >
              </p>
            }
          </div>
        </li>
      }
    </ul>
  `,
  styles: `
    ul {
      display: grid;
      gap: 0.75rem;
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      display: flex;
      gap: 0.625rem;
      overflow-wrap: anywhere;
    }
    tw-state-mark {
      flex: none;
      margin-block-start: 0.25rem;
    }
    p {
      margin: 0;
    }
    p:first-child a {
      font-weight: 600;
    }
  `,
})
export class StillList {
  protected readonly session = inject(Session);

  readonly machines = input.required<readonly Still[]>();
  /** What was left to do on the machines, as the techs wrote it. */
  readonly openItems = input<readonly { machine: { id: string } | null; words: string }[]>([]);

  protected readonly standing = machineStanding;

  protected waitsFor(machineId: string): string[] {
    return this.openItems().flatMap(({ machine, words }) =>
      machine?.id === machineId ? [words] : [],
    );
  }
}
