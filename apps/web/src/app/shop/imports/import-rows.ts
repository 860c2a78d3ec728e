import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { type Choice, ChoiceChips, LabelPipe, ListShell, listState } from '@lib/ui';
import { type Column, RowsExport } from '../../core/lists/rows-export';
import { type Import, type ImportRow, ImportsApi, type RowOutcome } from './imports-api';

const columns: readonly Column<ImportRow>[] = [
  { head: 'Row', text: ({ row }) => row },
  { head: 'What', text: ({ label }) => label },
  { head: 'Is', text: ({ outcome }) => outcome },
  {
    head: 'Column by column',
    text: ({ errors, changes }) =>
      [
        ...errors.map(({ column, detail }) => `${column} ${detail}`),
        ...changes.map(
          ({ column, from, to }) => `${column}: ${from || 'empty'} to ${to || 'empty'}`,
        ),
      ].join('; '),
  },
];

type OutcomeFilter = '' | RowOutcome;

/** The rows of a checked file: what each would do, or what is wrong with it, column by column. */
@Component({
  selector: 'tw-import-rows',
  imports: [ChoiceChips, LabelPipe, ListShell, ReactiveFormsModule],
  templateUrl: './import-rows.html',
  styles: `
    ul {
      margin: 0;
      padding: 0;
      list-style: none;
    }
    .column {
      font-weight: 500;
    }
    del {
      color: var(--tw-soft);
    }
    ins {
      text-decoration: none;
      font-weight: 500;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportRows {
  readonly #api = inject(ImportsApi);
  readonly #exports = inject(RowsExport);
  readonly sent = input.required<Import>();

  protected readonly rows = listState((ask) => this.#api.rows(this.#importId(), ask), {
    sorts: { row: 'As in the file' },
    filters: { outcome: '' as OutcomeFilter },
  });
  readonly #importId = computed(() => this.sent().id);
  protected readonly outcome = new FormControl<OutcomeFilter>('', { nonNullable: true });
  protected readonly choices = computed<readonly Choice[]>(() => {
    const { counts, rowsTotal } = this.sent();
    return [
      { value: 'all', label: `All ${rowsTotal}` },
      { value: 'bad', label: `Bad ${counts.bad}` },
      { value: 'new', label: `New ${counts.new}` },
      { value: 'changed', label: `Changed ${counts.changed}` },
      { value: 'unchanged', label: `Unchanged ${counts.unchanged}` },
    ];
  });

  constructor() {
    this.outcome.valueChanges
      .pipe(takeUntilDestroyed())
      .subscribe((value) =>
        this.rows.filterBy('outcome', (value as string) === 'all' ? '' : value),
      );
    effect(() => {
      // What must be put right is what somebody came to see.
      const first = this.sent().counts.bad > 0 ? 'bad' : 'all';
      untracked(() => {
        if (!this.outcome.value) this.outcome.setValue(first as OutcomeFilter);
      });
    });
  }

  /** The rows as they are narrowed, to be put right beside the file. */
  protected save(): void {
    const { cursor: _cursor, ...ask } = this.rows.ask();
    void this.#exports.save({
      name: `rows of ${this.sent().fileName.replace(/\.\w+$/, '')}`,
      one: 'row',
      columns,
      page: (asked) => this.#api.rows(this.#importId(), { ...ask, ...asked }),
    });
  }
}
