import { signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { LoadNote } from './load-note';

async function shown(error: unknown) {
  const thing = { error: signal<unknown>(undefined), reloads: 0, reload: () => thing.reloads++ };
  const fixture = TestBed.createComponent(LoadNote);
  fixture.componentRef.setInput('of', thing);
  await fixture.whenStable();
  const host = fixture.nativeElement as HTMLElement;
  const before = host.textContent;
  thing.error.set(error);
  await fixture.whenStable();
  return { thing, host, before };
}

describe('LoadNote', () => {
  it('says that it loads, then what went wrong, and tries again', async () => {
    const { thing, host, before } = await shown({ title: 'The service cannot answer' });
    expect(before).toContain('Loading');
    expect(host.textContent).toContain('The service cannot answer');
    host.querySelector('button')?.click();
    expect(thing.reloads).toBe(1);
  });

  it('does not offer to look again for what is not there', async () => {
    const { host } = await shown({ kind: 'not-found', title: 'There is nothing here' });
    expect(host.querySelector('button')).toBeNull();
  });
});
