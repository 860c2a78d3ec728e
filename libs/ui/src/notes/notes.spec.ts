import { type Type } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { BearerLabel } from './bearer-label';
import { Callout } from './callout';
import { EmptyNote } from './empty-note';
import { FormNotes } from './form-notes';
import { ProblemNote } from './problem-note';
import { problemText } from './problem-text';
import { ProgressLine } from './progress-line';
import { StatusLine } from './status-line';

async function shown<T>(type: Type<T>, inputs: Record<string, unknown>) {
  const fixture = TestBed.createComponent(type);
  for (const [name, value] of Object.entries(inputs)) fixture.componentRef.setInput(name, value);
  await fixture.whenStable();
  return { fixture, host: fixture.nativeElement as HTMLElement };
}

describe('notes', () => {
  it('a problem speaks in its own words, the detail before the title', () => {
    expect(problemText({ title: 'Some values are not right', detail: 'Add a bank first.' })).toBe(
      'Add a bank first.',
    );
    expect(problemText({ title: 'There is nothing here' })).toBe('There is nothing here');
    expect(problemText(new TypeError('fetch'))).toContain('no answer');
  });

  it('a problem offers to try again only where that can help', async () => {
    const { fixture, host } = await shown(ProblemNote, { problem: { title: 'Gone' } });
    let tries = 0;
    fixture.componentInstance.retry.subscribe(() => tries++);
    host.querySelector('button')?.click();
    expect(tries).toBe(1);
    fixture.componentRef.setInput('retriable', false);
    await fixture.whenStable();
    expect(host.querySelector('button')).toBeNull();
  });

  it('an empty note says what will appear', async () => {
    const { host } = await shown(EmptyNote, { text: 'Calls appear here.' });
    expect(host.textContent).toContain('Calls appear here.');
  });

  it('form notes are an alert before there is one to read out', async () => {
    const { fixture, host } = await shown(FormNotes, { notes: [] });
    expect(host.querySelector('[role=alert]')?.textContent?.trim()).toBe('');
    fixture.componentRef.setInput('notes', ['Bank A is full.']);
    await fixture.whenStable();
    expect(host.querySelector('[role=alert] p')?.textContent).toBe('Bank A is full.');
  });

  it('a callout carries its tone', async () => {
    const { host } = await shown(Callout, { tone: 'alarm' });
    expect(host.getAttribute('data-tone')).toBe('alarm');
  });

  it('the status region exists before it has anything to say', async () => {
    const { fixture, host } = await shown(StatusLine, {});
    expect(host.querySelector('[role=status]')).not.toBeNull();
    fixture.componentRef.setInput('message', 'Visit 0412 was cancelled.');
    fixture.componentRef.setInput('action', 'Undo');
    await fixture.whenStable();
    const done: string[] = [];
    fixture.componentInstance.acted.subscribe(() => done.push('undo'));
    fixture.componentInstance.dismissed.subscribe(() => done.push('close'));
    host.querySelectorAll('button').forEach((button) => button.click());
    expect(done).toEqual(['undo', 'close']);
  });

  it('the shop as bearer stands out', async () => {
    expect((await shown(BearerLabel, { bearer: 'shop' })).host.classList).toContain(
      'tw-bearer--shop',
    );
    expect((await shown(BearerLabel, { bearer: 'store' })).host.classList).not.toContain(
      'tw-bearer--shop',
    );
  });

  it('progress is told in words as well as by the bar', async () => {
    const { host } = await shown(ProgressLine, {
      label: 'Sending statements',
      done: 5,
      of: 8,
      word: 'mailed',
      aside: '1 uncertain',
    });
    const bar = host.querySelector('[role=progressbar]');
    expect(bar?.getAttribute('aria-valuetext')).toBe('5 of 8 mailed, 1 uncertain');
    expect(host.querySelector<HTMLElement>('.done')?.style.inlineSize).toBe('62.5%');
  });

  it('progress of nothing is no progress', async () => {
    const { host } = await shown(ProgressLine, { label: 'Reading', done: 0, of: 0 });
    expect(host.querySelector<HTMLElement>('.done')?.style.inlineSize).toBe('0%');
  });
});
