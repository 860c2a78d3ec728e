import { z } from 'zod';

export const machineKind = z.enum([
  'top_loader',
  'front_loader',
  'dryer',
  'stacked_pair',
  'extractor',
  'changer',
  'heater',
]);
export const energy = z.enum(['electric', 'gas', 'steam']);
export const machineState = z.enum(['up', 'degraded', 'down', 'locked_out', 'retired']);
export const visitState = z.enum(['planned', 'confirmed', 'in_process', 'completed', 'cancelled']);
export const callState = z.enum(['open', 'planned', 'closed', 'withdrawn']);
export const bearer = z.enum(['store', 'shop', 'supplier', 'contract', 'goodwill']);
export const cause = z.enum([
  'wear',
  'age',
  'misuse',
  'vandalism',
  'supply',
  'installation',
  'defective_part',
  'shop_error',
  'nothing_found',
]);
export const jobResult = z.enum([
  'put_right',
  'made_safe',
  'unfinished',
  'nothing_found',
  'replaced',
]);
/** What is reported of a machine before anybody has looked; `other` needs words. */
export const symptom = z.enum([
  'wont_start',
  'wont_fill',
  'wont_drain',
  'wont_heat',
  'wont_turn',
  'wont_spin',
  'wont_lock',
  'wont_open',
  'stops_midway',
  'leaks',
  'noisy',
  'smells',
  'takes_no_payment',
  'shows_error',
  'damaged',
  'other',
]);
/** In which way the part failed that was found to have failed. */
export const findingCode = z.enum([
  'blocked',
  'broken',
  'burnt',
  'worn',
  'loose',
  'leaking',
  'seized',
  'shorted',
  'misaligned',
  'soiled',
  'missing',
  'misadjusted',
  'other',
]);
export const lineKind = z.enum(['trip', 'labour', 'access', 'part', 'fee', 'late_charge']);
export const warrantyMark = z.enum(['none', 'shop_warranty', 'own_mistake']);
export const partSource = z.enum(['shelf', 'van', 'storeroom', 'ordered', 'salvaged']);
export const subscriptionState = z.enum(['trialing', 'active', 'past_due', 'paused', 'canceled']);
export const deliveryState = z.enum(['waiting', 'handing_over', 'sent', 'failed', 'uncertain']);
export const runState = z.enum(['building', 'sending', 'done', 'held', 'failed']);
/** What a live update says has changed; the browser asks again for what it shows of it. */
export const liveKind = z.enum([
  'call',
  'clients',
  'conditions',
  'contacts',
  'contract',
  'crew',
  'delivery',
  'files',
  'imports',
  'invitations',
  'machines',
  'parts',
  'payment',
  'prices',
  'ruling',
  'shop',
  'statement',
  'statement-run',
  'stores',
  'ticket',
  'visit',
]);
export const conditionKind = z.enum(['access', 'supply', 'hazard']);

export type MachineKind = z.infer<typeof machineKind>;
export type Energy = z.infer<typeof energy>;
export type MachineState = z.infer<typeof machineState>;
export type VisitState = z.infer<typeof visitState>;
export type CallState = z.infer<typeof callState>;
export type Bearer = z.infer<typeof bearer>;
export type Cause = z.infer<typeof cause>;
export type JobResult = z.infer<typeof jobResult>;
export type Symptom = z.infer<typeof symptom>;
export type FindingCode = z.infer<typeof findingCode>;
export type LineKind = z.infer<typeof lineKind>;
export type WarrantyMark = z.infer<typeof warrantyMark>;
export type PartSource = z.infer<typeof partSource>;
export type LiveKind = z.infer<typeof liveKind>;
export type SubscriptionState = z.infer<typeof subscriptionState>;
export type DeliveryState = z.infer<typeof deliveryState>;
export type RunState = z.infer<typeof runState>;
