import { computed, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { type Sheet } from '../kept/kept';
import { type Act } from '../outbox/local-act';
import { projectSheet } from '../projection/project-sheet';
import { sampleSheet } from '../projection/sample-sheet';
import { FieldVisit } from '../sheets/field-visit';
import { JobEntry } from './job-entry';
import { type JobForm } from './job-form';

const opened = {
  kind: 'job_opened',
  at: '2031-05-06T15:30:00Z',
  payload: { jobId: 'job', machineId: 'machine-4' },
} as Act;
const cautions = cautionsOf();

/** The visit as the real one is: what is recorded comes back in the sheet. */
class Visit {
  readonly acts = signal<readonly Act[]>([opened, cautions]);
  readonly kept = signal<Sheet>(sampleSheet);
  readonly sheet = computed(() => projectSheet(this.kept(), this.acts(), 'Imre'));
  readonly closed = signal(false);

  record(kind: string, payload: object): Promise<void> {
    const act = { kind, at: '2031-05-06T15:40:00Z', payload } as Act;
    this.acts.update((acts) => [...acts, act]);
    return Promise.resolve();
  }

  kinds(): string[] {
    return this.acts()
      .slice(2)
      .map(({ kind }) => kind);
  }
}

describe('entering a job', () => {
  let visit: Visit;
  let entry: JobEntry;
  let form: JobForm;

  beforeEach(() => {
    jest.useFakeTimers();
    visit = new Visit();
    TestBed.configureTestingModule({
      providers: [JobEntry, { provide: FieldVisit, useValue: visit }],
    });
    entry = TestBed.inject(JobEntry);
    entry.open('job');
    TestBed.tick();
    form = entry.form() as JobForm;
  });
  afterEach(() => jest.useRealTimers());

  it('records what is chosen a moment later, taps together as one act', () => {
    for (const minutes of [5, 10, 15]) entry.enter('minutes', minutes);
    expect(visit.kinds()).toEqual([]);
    jest.advanceTimersByTime(1000);
    expect(visit.kinds()).toEqual(['minutes']);
    expect(visit.sheet().jobs[0]?.shop?.minutes).toBe(15);
  });

  it('records what is written when its field is left, not before', () => {
    entry.enter('finding', 'Lock burnt ');
    jest.advanceTimersByTime(5000);
    expect(visit.kinds()).toEqual([]);
    entry.commit();
    expect(visit.kinds()).toEqual(['finding']);
    TestBed.tick();
    // The space somebody is typing behind is not taken from under the cursor.
    expect(form.value.finding).toBe('Lock burnt ');
  });

  it('goes on with the same form whatever is recorded meanwhile', () => {
    entry.enter('minutes', 5);
    void visit.record('cause', { jobId: 'job', cause: 'wear' });
    TestBed.tick();
    expect(entry.form()).toBe(form);
    expect(form.value).toMatchObject({ minutes: 5, cause: 'wear' });
  });

  it('records all of it when the page is left', () => {
    entry.enter('action', 'Lock fitted');
    entry.enter('cause', 'wear');
    TestBed.resetTestingModule();
    expect(visit.kinds()).toEqual(['cause', 'action']);
  });

  it('counts coins at the price of the cycles, until told otherwise', () => {
    entry.enter('cycles', 2);
    expect(form.value.amount).toBe(0);
    entry.enter('coins', 8);
    expect(form.value.amount).toBe(700);
    entry.enter('amount', 650);
    entry.enter('coins', 7);
    expect(form.value.amount).toBe(650);
  });

  it('shows covers closed until the last caution is ticked', () => {
    expect(form.controls.finding.enabled).toBe(true);
    visit.acts.set([opened]);
    TestBed.tick();
    expect(form.controls.finding.disabled).toBe(true);
    expect(form.controls.action.disabled).toBe(true);
    expect(form.controls.cause.enabled).toBe(true);
  });

  it('records nothing once the ticket is signed off', () => {
    visit.closed.set(true);
    TestBed.tick();
    expect(form.controls.minutes.disabled).toBe(true);
    entry.enter('minutes', 5);
    entry.commit();
    expect(visit.kinds()).toEqual([]);
  });
});

function cautionsOf(): Act {
  const codes = [
    'isolate',
    'lock_and_tag',
    'close_water',
    'discharge_capacitors',
    'prove_dead',
    'block_drum',
    'stand_safely',
    'standing_water',
  ];
  return {
    kind: 'cautions_ticked',
    at: '2031-05-06T15:31:00Z',
    payload: { jobId: 'job', cautions: codes },
  } as Act;
}
