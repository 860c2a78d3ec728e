import { type Choice } from '@lib/ui';
import { type CrewRole } from './crew-api';

/** The roles of a crew, with what each is for. */
export const crewRoles: readonly Choice<CrewRole>[] = [
  { value: 'tech', label: 'Tech: own day, records visits' },
  { value: 'office', label: 'Office: calls, visits, statements' },
  { value: 'shop_owner', label: 'Owner: everything, prices and money too' },
];
