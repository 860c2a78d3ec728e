import { computed, effect, type Signal, signal, untracked } from '@angular/core';
import { debounceTime, distinctUntilChanged, type Observable, Subject } from 'rxjs';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';

/** One page as the API's lists answer it. */
export interface ListPage<T> {
  readonly items: readonly T[];
  readonly next: string | null;
  readonly count: { readonly value: number; readonly capped: boolean };
}

type Filters = Readonly<Record<string, string>>;

/** What a load is asked for: exactly the query of a list operation, without what is not set. */
type ListAsk<S extends string, F extends Filters> = {
  sort: S;
  cursor?: string;
  q?: string;
} & { [K in keyof F]?: Exclude<F[K], ''> };

interface ListOptions<S extends string, F extends Filters> {
  /** Sort keys of the operation with what they are called; the first is the one to begin with. */
  sorts: Readonly<Record<S, string>>;
  /** Filters at the start; '' is "any". */
  filters?: F;
}

/** What the list shell needs of a list, whatever its rows are. */
export interface ListControls {
  readonly phase: Signal<'loading' | 'shown' | 'failed'>;
  readonly problem: Signal<unknown>;
  readonly size: Signal<number>;
  readonly range: Signal<string>;
  readonly narrowed: Signal<boolean>;
  readonly hasNext: Signal<boolean>;
  readonly hasPrevious: Signal<boolean>;
  readonly search: Signal<string>;
  readonly sort: Signal<string>;
  readonly sorts: readonly { value: string; label: string }[];
  searchFor(words: string): void;
  sortBy(key: string): void;
  next(): void;
  previous(): void;
  reload(): void;
  clear(): void;
}

interface Asked<S extends string, F extends Filters> {
  readonly q: string;
  readonly sort: S;
  readonly filters: F;
  /** The cursors that led here, each with how many rows stand before its page. */
  readonly trail: readonly { cursor: string; before: number }[];
}

const searchPause = 250;

/**
 * A list that lives on the server: search, filters, sort and pages, as signals. Create it where
 * injection is possible, e.g. as a field of a component:
 *
 *     readonly stores = listState((ask) => this.#api.call('stores.list', { query: ask }), {
 *       sorts: { name: 'Name', city: 'City' },
 *       filters: { state: '' as '' | MachineState },
 *     });
 *
 * `load` is called anew whenever a signal it reads changes.
 */
export function listState<T, const S extends string, F extends Filters = Record<never, string>>(
  load: (ask: ListAsk<S, F>) => Observable<ListPage<T>>,
  options: ListOptions<S, F>,
): ListState<T, S, F> {
  return new ListState(load, options);
}

export class ListState<T, S extends string, F extends Filters> implements ListControls {
  readonly sorts: readonly { value: S; label: string }[];
  readonly #asked;
  readonly #again = signal(0);
  readonly #page = signal<ListPage<T> | undefined>(undefined);
  readonly #typed = new Subject<string>();
  readonly #startFilters: F;

  readonly phase = signal<'loading' | 'shown' | 'failed'>('loading');
  readonly problem = signal<unknown>(undefined);

  readonly items = computed<readonly T[]>(() => this.#page()?.items ?? []);
  readonly size = computed(() => this.items().length);
  readonly count = computed(() => this.#page()?.count ?? { value: 0, capped: false });
  readonly hasNext = computed(() => !!this.#page()?.next);
  readonly hasPrevious = computed(() => this.#asked().trail.length > 0);
  readonly search = computed(() => this.#asked().q);
  readonly sort = computed<S>(() => this.#asked().sort);
  readonly filters = computed<F>(() => this.#asked().filters);
  readonly narrowed = computed(
    () => this.search() !== '' || Object.values(this.filters()).some((value) => value !== ''),
  );

  /** "26–50 of 180" */
  readonly range = computed(() => {
    const { value, capped } = this.count();
    const from = (this.#asked().trail.at(-1)?.before ?? 0) + 1;
    const to = from + this.size() - 1;
    const all = `${capped ? 'more than ' : ''}${value.toLocaleString('en')}`;
    return to < from ? '' : `${from}–${to} of ${all}`;
  });

  /** The query of what is shown, without its page: what an export of the same list asks for. */
  readonly ask = computed<ListAsk<S, F>>(() => this.#askOf({ ...this.#asked(), trail: [] }));

  constructor(load: (ask: ListAsk<S, F>) => Observable<ListPage<T>>, options: ListOptions<S, F>) {
    const labels = Object.entries(options.sorts) as [S, string][];
    this.sorts = labels.map(([value, label]) => ({ value, label }));
    const first = this.sorts[0];
    if (!first) throw new Error('A list needs at least one sort key');
    this.#startFilters = options.filters ?? ({} as F);
    this.#asked = signal<Asked<S, F>>({
      q: '',
      sort: first.value,
      filters: this.#startFilters,
      trail: [],
    });

    this.#typed
      .pipe(debounceTime(searchPause), distinctUntilChanged(), takeUntilDestroyed())
      .subscribe((q) => this.#change({ q }));

    effect((onCleanup) => {
      this.#again();
      const answer = load(this.#askOf(this.#asked()));
      const subscription = untracked(() => this.#follow(answer));
      onCleanup(() => subscription.unsubscribe());
    });
  }

  searchFor(words: string): void {
    this.#typed.next(words.trim());
  }

  sortBy(key: string): void {
    const known = this.sorts.find((sort) => sort.value === key);
    if (known) this.#change({ sort: known.value });
  }

  filterBy<K extends keyof F>(name: K, value: F[K]): void {
    this.#change({ filters: { ...this.#asked().filters, [name]: value } });
  }

  clear(): void {
    const unset = Object.fromEntries(Object.keys(this.#startFilters).map((name) => [name, '']));
    this.#change({ q: '', filters: unset as F });
  }

  next(): void {
    const cursor = this.#page()?.next;
    if (!cursor || this.phase() === 'loading') return;
    const { trail } = this.#asked();
    const before = (trail.at(-1)?.before ?? 0) + this.size();
    this.#asked.update((asked) => ({ ...asked, trail: [...trail, { cursor, before }] }));
  }

  previous(): void {
    this.#asked.update((asked) => ({ ...asked, trail: asked.trail.slice(0, -1) }));
  }

  /** Loads the same page again, e.g. when something in it changed. */
  reload(): void {
    this.#again.update((n) => n + 1);
  }

  #change(change: Partial<Asked<S, F>>): void {
    this.#asked.update((asked) => ({ ...asked, ...change, trail: [] }));
  }

  #follow(answer: Observable<ListPage<T>>) {
    this.phase.set('loading');
    return answer.subscribe({
      next: (page) => {
        this.#page.set(page);
        this.problem.set(undefined);
        this.phase.set('shown');
      },
      error: (problem: unknown) => {
        this.problem.set(problem);
        this.phase.set('failed');
      },
    });
  }

  #askOf(asked: Asked<S, F>): ListAsk<S, F> {
    const cursor = asked.trail.at(-1)?.cursor;
    const set = Object.entries(asked.filters).filter(([, value]) => value !== '');
    return {
      sort: asked.sort,
      ...(asked.q ? { q: asked.q } : {}),
      ...(cursor ? { cursor } : {}),
      ...Object.fromEntries(set),
    } as ListAsk<S, F>;
  }
}
