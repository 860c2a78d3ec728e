import {
  ChangeDetectionStrategy,
  Component,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { counted, SectionHead } from '@lib/ui';
import { Session } from '../../core/session/session';
import { BankForm } from './bank-form';
import { type Bank } from './stores-api';

/** The banks of a store: their letters, and the words by which people know them. */
@Component({
  selector: 'tw-banks-section',
  imports: [BankForm, MatButton, SectionHead],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-section-head heading="Banks" sub="Rows of machines that stand together.">
      @if (mayChange() && open() !== 'new') {
        <button matButton="outlined" type="button" (click)="open.set('new')">Add a bank</button>
      }
    </tw-section-head>
    @if (open() === 'new') {
      <div class="tw-sheet">
        <tw-bank-form [storeId]="storeId()" (saved)="saved()" (closed)="open.set(undefined)" />
      </div>
    }
    <ul>
      @for (bank of banks(); track bank.id) {
        <li>
          @if (open() === bank.id) {
            <tw-bank-form
              [storeId]="storeId()"
              [bank]="bank"
              (saved)="saved()"
              (closed)="open.set(undefined)"
            />
          } @else {
            <strong>{{ bank.letter }}</strong>
            <span class="words">{{ bank.words }}</span>
            <span class="tw-soft">{{ counted(bank.machines.length, 'machine') }}</span>
            @if (mayChange()) {
              <button matButton type="button" (click)="open.set(bank.id)">
                Change<span class="tw-unseen"> bank {{ bank.letter }}</span>
              </button>
            }
          }
        </li>
      }
    </ul>
  `,
  styles: `
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    li {
      display: flex;
      flex-wrap: wrap;
      align-items: center;
      gap: 0.25rem 1rem;
      min-block-size: 2.75rem;
      padding-block: 0.25rem;
      border-block-end: 1px solid var(--tw-hairline);
    }
    .words {
      flex: 1 1 6rem;
      overflow-wrap: anywhere;
    }
    tw-bank-form {
      flex: 1;
    }
  `,
})
export class BanksSection {
  readonly #session = inject(Session);

  readonly storeId = input.required<string>();
  readonly banks = input.required<readonly Bank[]>();
  readonly changed = output<void>();

  protected readonly counted = counted;
  /** The id of the bank whose form stands open; `new` for one to be added. */
  protected readonly open = signal<string | undefined>(undefined);
  protected readonly mayChange = computed(() => this.#session.mayChange('machines.change'));

  protected saved(): void {
    this.open.set(undefined);
    this.changed.emit();
  }
}
