import { type BodyOf } from '@lib/contracts/web';

export type Act = BodyOf<'acts.record'>['acts'][number];
export type ActKind = Act['kind'];
export type PayloadOf<K extends ActKind> = Extract<Act, { kind: K }>['payload'];

/**
 * An act as this device keeps it. `waiting`: the server has not answered for it. `sent`: it has.
 * `refused`: it has not taken it, and a person must look.
 */
export interface LocalAct {
  readonly id: string;
  /** Grows with every act made on this device, also when its clock is put back. */
  readonly order: number;
  readonly visitId: string;
  readonly act: Act;
  readonly state: 'waiting' | 'sent' | 'refused';
  /** Why it was refused, in the server's words. */
  readonly reason: string;
  /** When the server answered for it, by the device's clock. */
  readonly answeredAt: string | null;
}

/** The job an act is of; undefined for acts of the visit itself. */
export function jobOf({ act }: Pick<LocalAct, 'act'>): string | undefined {
  return 'jobId' in act.payload ? act.payload.jobId : undefined;
}

export function inOrder(acts: readonly LocalAct[]): LocalAct[] {
  return [...acts].sort((a, b) => a.order - b.order || (a.id < b.id ? -1 : 1));
}
