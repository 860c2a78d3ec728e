import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { type Observable, of, Subject, throwError } from 'rxjs';
import { type ListPage, listState } from './list-state';

const page = (items: string[], next: string | null, value = items.length): ListPage<string> => ({
  items,
  next,
  count: { value, capped: false },
});

function listOver(load: (ask: Record<string, unknown>) => Observable<ListPage<string>>) {
  const asks: Record<string, unknown>[] = [];
  const list = TestBed.runInInjectionContext(() =>
    listState(
      (ask) => {
        asks.push(ask);
        return load(ask);
      },
      { sorts: { name: 'Name', opened: 'Opened' }, filters: { state: '' } },
    ),
  );
  TestBed.tick();
  return { list, asks };
}

describe('listState', () => {
  afterEach(() => jest.useRealTimers());

  it('loads the first page and says which rows it holds', () => {
    const { list, asks } = listOver(() => of(page(['a', 'b'], 'c1', 5)));
    expect(asks).toEqual([{ sort: 'name' }]);
    expect(list.items()).toEqual(['a', 'b']);
    expect(list.range()).toBe('1–2 of 5');
    expect(list.hasPrevious()).toBe(false);
  });

  it('goes forward by the cursor it was given and back the way it came', () => {
    const { list, asks } = listOver((ask) =>
      of(ask['cursor'] ? page(['c'], null, 3) : page(['a', 'b'], 'c1', 3)),
    );
    list.next();
    TestBed.tick();
    expect(asks.at(-1)).toEqual({ sort: 'name', cursor: 'c1' });
    expect(list.range()).toBe('3–3 of 3');
    expect(list.hasNext()).toBe(false);
    list.previous();
    TestBed.tick();
    expect(list.items()).toEqual(['a', 'b']);
    expect(list.range()).toBe('1–2 of 3');
  });

  it('begins anew when sort or filter changes', () => {
    const { list, asks } = listOver(() => of(page(['a'], 'c1', 9)));
    list.next();
    TestBed.tick();
    list.sortBy('opened');
    list.filterBy('state', 'down');
    TestBed.tick();
    expect(asks.at(-1)).toEqual({ sort: 'opened', state: 'down' });
    expect(list.hasPrevious()).toBe(false);
    expect(list.narrowed()).toBe(true);
    list.clear();
    TestBed.tick();
    expect(asks.at(-1)).toEqual({ sort: 'opened' });
  });

  it('ignores a sort key the list does not have', () => {
    const { list } = listOver(() => of(page(['a'], null)));
    list.sortBy('colour');
    expect(list.sort()).toBe('name');
  });

  it('searches once the typing has paused', () => {
    jest.useFakeTimers();
    const { list, asks } = listOver(() => of(page(['a'], null)));
    list.searchFor('fox');
    list.searchFor('foxglove ');
    jest.advanceTimersByTime(249);
    TestBed.tick();
    expect(asks).toHaveLength(1);
    jest.advanceTimersByTime(1);
    TestBed.tick();
    expect(asks.slice(1)).toEqual([{ sort: 'name', q: 'foxglove' }]);
  });

  it('drops the answer to a question that is no longer asked', () => {
    const answers: Subject<ListPage<string>>[] = [];
    const { list } = listOver(() => {
      const answer = new Subject<ListPage<string>>();
      answers.push(answer);
      return answer;
    });
    list.sortBy('opened');
    TestBed.tick();
    answers[1]?.next(page(['new'], null));
    answers[0]?.next(page(['old'], null));
    expect(list.items()).toEqual(['new']);
  });

  it('keeps the rows when a reload fails, and shows them again when it works', () => {
    let works = true;
    const { list } = listOver(() =>
      works ? of(page(['a'], null)) : throwError(() => new Error('no signal')),
    );
    works = false;
    list.reload();
    TestBed.tick();
    expect(list.phase()).toBe('failed');
    expect(list.items()).toEqual(['a']);
    works = true;
    list.reload();
    TestBed.tick();
    expect(list.phase()).toBe('shown');
    expect(list.problem()).toBeUndefined();
  });

  it('loads anew when a signal that the load reads changes', () => {
    const client = signal('one');
    const { asks } = listOver(() => of(page([client()], null)));
    client.set('two');
    TestBed.tick();
    expect(asks).toHaveLength(2);
  });
});
