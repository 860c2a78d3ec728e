import { FormControl, FormGroup } from '@angular/forms';
import { signal } from '@angular/core';
import { Problem } from '../api/problem';
import { changedValues } from './changed-values';
import { toldStale } from './told-stale';

describe('changedValues', () => {
  it('holds what was changed and nothing else, groups as a whole', () => {
    const form = new FormGroup({
      name: new FormControl('Foxglove Lane'),
      hours: new FormControl('7 to 22'),
      agreed: new FormGroup({ trip: new FormControl(100), hour: new FormControl(200) }),
    });
    form.controls.name.setValue('Foxglove Lane 12');
    form.controls.name.markAsDirty();
    form.controls.agreed.controls.trip.markAsDirty();
    expect(changedValues(form)).toEqual({
      name: 'Foxglove Lane 12',
      agreed: { trip: 100, hour: 200 },
    });
  });
});

describe('toldStale', () => {
  it('takes the new version and says so, but lets other refusals pass', () => {
    const thing = { reloads: 0, reload: () => thing.reloads++ };
    const notes = signal<readonly string[]>([]);
    expect(toldStale(new Problem('conflict', 409, 'no'), thing, notes)).toBe(false);
    expect(toldStale(new Problem('stale-version', 412, 'old'), thing, notes)).toBe(true);
    expect(thing.reloads).toBe(1);
    expect(notes()[0]).toContain('What you wrote is kept');
  });
});
