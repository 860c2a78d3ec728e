// Written by `npm run contracts` from the contracts: do not edit by hand.

export const bearers = ['store', 'shop', 'supplier', 'contract', 'goodwill'] as const;
export const callStates = ['open', 'planned', 'closed', 'withdrawn'] as const;
export const causes = ['wear', 'age', 'misuse', 'vandalism', 'supply', 'installation', 'defective_part', 'shop_error', 'nothing_found'] as const;
export const conditionKinds = ['access', 'supply', 'hazard'] as const;
export const deliveryStates = ['waiting', 'handing_over', 'sent', 'failed', 'uncertain'] as const;
export const energies = ['electric', 'gas', 'steam'] as const;
export const findingCodes = ['blocked', 'broken', 'burnt', 'worn', 'loose', 'leaking', 'seized', 'shorted', 'misaligned', 'soiled', 'missing', 'misadjusted', 'other'] as const;
export const jobResults = ['put_right', 'made_safe', 'unfinished', 'nothing_found', 'replaced'] as const;
export const lineKinds = ['trip', 'labour', 'access', 'part', 'fee', 'late_charge'] as const;
export const liveKinds = ['call', 'clients', 'conditions', 'contacts', 'contract', 'crew', 'delivery', 'files', 'imports', 'invitations', 'machines', 'parts', 'payment', 'prices', 'ruling', 'shop', 'statement', 'statement-run', 'stores', 'ticket', 'visit'] as const;
export const machineKinds = ['top_loader', 'front_loader', 'dryer', 'stacked_pair', 'extractor', 'changer', 'heater'] as const;
export const machineStates = ['up', 'degraded', 'down', 'locked_out', 'retired'] as const;
export const partSources = ['shelf', 'van', 'storeroom', 'ordered', 'salvaged'] as const;
export const runStates = ['building', 'sending', 'done', 'held', 'failed'] as const;
export const subscriptionStates = ['trialing', 'active', 'past_due', 'paused', 'canceled'] as const;
export const symptoms = ['wont_start', 'wont_fill', 'wont_drain', 'wont_heat', 'wont_turn', 'wont_spin', 'wont_lock', 'wont_open', 'stops_midway', 'leaks', 'noisy', 'smells', 'takes_no_payment', 'shows_error', 'damaged', 'other'] as const;
export const visitStates = ['planned', 'confirmed', 'in_process', 'completed', 'cancelled'] as const;
export const warrantyMarks = ['none', 'shop_warranty', 'own_mistake'] as const;
