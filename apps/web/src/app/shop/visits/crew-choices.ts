import { computed, inject, type Signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { type Choice } from '@lib/ui';
import { CrewApi } from '../crew/crew-api';

/**
 * Who can be sent: techs first, then the others of the crew, who go when nobody else can. Call it
 * where injection is possible.
 */
export function crewChoices(): Signal<readonly Choice[]> {
  const api = inject(CrewApi);
  const crew = rxResource({ stream: () => api.list({ limit: 100 }) });
  return computed(() => {
    const people = crew.hasValue() ? crew.value().items : [];
    const techs = people.filter(({ role }) => role === 'tech');
    const others = people.filter(({ role }) => role !== 'tech');
    return [
      ...techs.map(({ id, name }) => ({ value: id, label: name })),
      ...others.map(({ id, name }) => ({ value: id, label: `${name} (not a tech)` })),
    ];
  });
}
