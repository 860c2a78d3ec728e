import { failedPart, lastRepairOf, lastSameSymptom, partDaysFor, type PastPart } from './history';
import { capitalised, causeWords, days, daysEarlier, lineWords, machineWords } from './phrases';
import { type Weighing } from './weighing';

/**
 * The supplier bears a part whose predecessor was defective, within its own or the machine's
 * warranty. For any other cause an unexpired warranty is only noted, so that nobody claims it.
 */
export function weighSupplier(weighing: Weighing): void {
  const { line, context } = weighing;
  if (line.kind !== 'part' || line.part?.source === 'storeroom') return;
  const { job, machineSupplierWarrantyUntil } = context;
  const warranties = [
    {
      code: 'supplier_warranty_on_part' as const,
      name: 'The supplier’s warranty on the part that failed',
      until: failedPart(context, line.part)?.part.supplierWarrantyUntil ?? null,
    },
    {
      code: 'supplier_warranty_on_machine' as const,
      name: 'The maker’s warranty on the machine',
      until: machineSupplierWarrantyUntil,
    },
  ];
  for (const { code, name, until } of warranties) {
    if (until === null) continue;
    if (until < job.on) {
      if (job.cause === 'defective_part' && !weighing.decided) {
        weighing.note('supplier_warranty_over', { until }, `${name} ended on ${until}.`);
      }
    } else if (job.cause !== 'defective_part') {
      const words = `${name} runs until ${until} but doesn’t apply: the cause is ${causeWords[job.cause]}.`;
      weighing.note('supplier_warranty_not_for_cause', { until, cause: job.cause }, words);
    } else if (!weighing.decided) {
      const words =
        `A defective part, and ${name.charAt(0).toLowerCase()}${name.slice(1)} runs until ` +
        `${until}.`;
      weighing.decide('supplier', code, { until }, words);
    }
  }
}

/** What the shop warrants: a part it fitted, or work it did on what failed now. */
export function weighShopWarranty(weighing: Weighing): void {
  if (weighing.decided) return;
  if (weighing.line.kind === 'part') weighFittedPart(weighing);
  else weighLabour(weighing);
}

function weighFittedPart(weighing: Weighing): void {
  const { context, line } = weighing;
  const failed = failedPart(context, line.part);
  if (!failed) return;
  const { part, job, daysAgo } = failed;
  if (part.source === 'storeroom') {
    const words =
      `The ${part.description} fitted with job ${job.ticketNumber} was the store’s own; we ` +
      'don’t warrant it.';
    weighing.note('own_part_of_store', { ticket: job.ticketNumber }, words);
    return;
  }
  const warranted = partDaysFor(context.rules, part.category ?? line.part?.category ?? null);
  const params = { ticket: job.ticketNumber, days: daysAgo, warranted };
  const fact =
    `${partName(failed)} warranted ${days(warranted)}; ours was fitted ${daysEarlier(daysAgo)} ` +
    `with job ${job.ticketNumber}`;
  if (daysAgo <= warranted) {
    weighing.decide('shop', 'part_in_warranty', params, `${fact}.`);
  } else {
    const words = `${fact}, ${days(daysAgo - warranted)} past that.`;
    weighing.note('part_out_of_warranty', params, words);
  }
}

function partName({ part }: PastPart): string {
  return part.category === null ? 'Parts are' : `Parts of class ${part.category} are`;
}

function weighLabour(weighing: Weighing): void {
  const { context } = weighing;
  const repair = lastRepairOf(context);
  if (!repair) return;
  const { job, daysAgo } = repair;
  const warranted = context.rules.labourDays;
  const params = { ticket: job.ticketNumber, days: daysAgo, warranted };
  const fact =
    `Labour is warranted ${days(warranted)} from sign-off; job ${job.ticketNumber} was signed ` +
    `off ${daysEarlier(daysAgo)}`;
  if (daysAgo <= warranted) {
    weighing.decide('shop', 'labour_in_warranty', params, `${fact}.`);
  } else {
    const words = `${fact}, ${days(daysAgo - warranted)} past that.`;
    weighing.note('labour_out_of_warranty', params, words);
  }
}

/**
 * A return for the same fault within the window: the shop bears coming and working again, though
 * not a part that nobody warrants. Whether it is the same fault is the owner's to say.
 */
export function weighCallback(weighing: Weighing): void {
  const { line, context } = weighing;
  if (weighing.decided || line.kind === 'part') return;
  const past = lastSameSymptom(context);
  const window = context.rules.callbackDays;
  if (!past || window === 0 || past.daysAgo > window) return;
  const { job, daysAgo } = past;
  const params = { ticket: job.ticketNumber, days: daysAgo, window };
  if (job.result === 'unfinished' || job.result === 'made_safe') {
    const words =
      `Job ${job.ticketNumber}, ${daysEarlier(daysAgo)}, left the same fault open and said so; ` +
      'this is no callback.';
    weighing.note('callback_left_open', params, words);
    return;
  }
  const words =
    `The same fault came back within ${days(window)}: job ${job.ticketNumber} was signed off ` +
    `${daysEarlier(daysAgo)}.`;
  weighing.decide('shop', 'callback', params, words);
  weighing.askOwner();
}

/** A maintenance contract in force, as far as it covers this kind of machine and line. */
export function weighContract(weighing: Weighing): void {
  const { line, context } = weighing;
  const { contract, job } = context;
  if (weighing.decided || !contract) return;
  const what = lineWords[line.kind];
  const params = { contract: contract.name, kind: line.kind, machine: job.machineKind };
  if (contract.machineKinds && !contract.machineKinds.includes(job.machineKind)) {
    const words = `Contract ${contract.name} doesn’t cover ${machineWords[job.machineKind]}.`;
    weighing.note('contract_does_not_cover', params, words);
  } else if (covers(weighing)) {
    const words = `Contract ${contract.name} covers ${what}.`;
    weighing.decide('contract', 'contract_covers', params, words);
  } else {
    const words = `Contract ${contract.name} doesn’t cover ${what}.`;
    weighing.note('contract_does_not_cover', params, words);
  }
}

function covers({ line, context: { contract } }: Weighing): boolean {
  if (!contract) return false;
  switch (line.kind) {
    case 'labour':
    case 'access':
      return contract.labour;
    case 'part':
      return contract.parts;
    case 'trip':
      return contract.trip;
    case 'fee':
    case 'late_charge':
      return false;
  }
}

/**
 * The tech's word where no rule decided. The record may be younger than the warranty, so without
 * a record it carries the proposal; against the record it doesn't.
 */
export function weighBareMark(weighing: Weighing): void {
  const { job } = weighing.context;
  if (weighing.decided || job.mark !== 'shop_warranty') return;
  const against =
    weighing.noted('labour_out_of_warranty') || weighing.noted('part_out_of_warranty');
  const params = { by: job.markedBy };
  if (against) {
    const words = `By the record the warranty is over, against ${job.markedBy}’s mark: the store bears it.`;
    weighing.decide('store', 'mark_contradicted', params, words);
  } else {
    const words = `No earlier job of ours is on record for it; it stands on ${job.markedBy}’s word.`;
    weighing.decide('shop', 'mark_has_no_record', params, words);
    weighing.askOwner();
  }
}

export function weighRest(weighing: Weighing): void {
  if (weighing.decided) return;
  const what = capitalised(lineWords[weighing.line.kind]);
  const verb = weighing.line.kind === 'part' ? 'are' : 'is';
  const words = `${what} ${verb} the store’s: no warranty, contract or other rule applies.`;
  weighing.decide('store', 'nothing_applies', {}, words);
}
