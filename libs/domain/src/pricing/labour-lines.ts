import { multiplyDivide } from '../money/rounding';
import { type AccessRule } from './edition';
import { type BilledLabour } from './labour';
import { priced } from './line';
import { type JobToPrice, type PricedLine, type VisitToPrice } from './visit';

/** Labour in normal hours and after hours, as far as either was worked or is billed. */
export function labourLines(
  visit: VisitToPrice,
  job: JobToPrice,
  labour: BilledLabour,
  index: number,
): PricedLine[] {
  const { normalPerHour, afterHoursPerHour } = visit.edition.labour;
  const billed = labour.jobs[index] ?? { normal: 0, afterHours: 0 };
  const kinds = [
    {
      key: 'labour',
      name: `Labour on ${job.machine}`,
      worked: job.minutes,
      minutes: billed.normal,
      perHour: visit.overrides?.normalPerHour ?? normalPerHour,
    },
    {
      key: 'labour_after_hours',
      name: `Labour on ${job.machine}, after hours`,
      worked: job.afterHoursMinutes,
      minutes: billed.afterHours,
      perHour: visit.overrides?.afterHoursPerHour ?? afterHoursPerHour,
    },
  ];
  const unbilled = job.result === 'nothing_found' && visit.edition.nothingFound !== 'bill_minimum';
  return kinds
    .filter(({ worked, minutes }) => worked > 0 || minutes > 0)
    .map(({ key, name, worked, minutes, perHour }) =>
      priced(visit, {
        lineKey: `job:${job.jobId}:${key}`,
        jobId: job.jobId,
        kind: 'labour',
        description: name,
        unit: 'minute',
        quantityMilli: (unbilled ? worked : minutes) * 1_000,
        unitPrice: unbilled ? 0 : perHour,
        cost: multiplyDivide(job.labourCostPerHour, worked, 60),
        reasons: unbilled
          ? [`Nothing found: ${worked} minutes of testing, not billed by the shop’s rule`]
          : labourReasons(visit, labour, worked, minutes, job.result === 'nothing_found'),
      }),
    );
}

function labourReasons(
  visit: VisitToPrice,
  labour: BilledLabour,
  worked: number,
  minutes: number,
  nothingFound: boolean,
): string[] {
  const { minimumMinutes, incrementMinutes } = visit.edition.labour;
  const reasons = [`${worked} minutes worked`];
  if (nothingFound && worked > minimumMinutes) {
    reasons.push(`Nothing found: at most the minimum of ${minimumMinutes} minutes counts`);
  }
  if (labour.toppedUp > 0) {
    reasons.push(
      `The visit’s ${labour.worked} minutes are billed as the minimum of ${minimumMinutes}`,
    );
  }
  if (labour.billed > labour.worked + labour.toppedUp) {
    reasons.push(`Billed in steps of ${incrementMinutes} minutes: ${labour.billed} for the visit`);
  }
  if (minutes !== worked && visit.jobs.length > 1) {
    reasons.push(`This machine’s share by time worked: ${minutes} of ${labour.billed} minutes`);
  }
  return reasons;
}

/** The minutes it took to reach the machine, billed by the edition's rule. */
export function accessLines(visit: VisitToPrice, job: JobToPrice): PricedLine[] {
  if (job.accessMinutes === 0) return [];
  const rule = visit.edition.access;
  const spared = job.result === 'nothing_found' && visit.edition.nothingFound !== 'bill_minimum';
  const minutes = spared ? 0 : billedAccess(rule, job.accessMinutes);
  const worked = `${job.accessMinutes} minutes to reach the machine and close it in again`;
  return [
    priced(visit, {
      lineKey: `job:${job.jobId}:access`,
      jobId: job.jobId,
      kind: 'access',
      description: `Access to ${job.machine}`,
      unit: 'minute',
      quantityMilli: (minutes || job.accessMinutes) * 1_000,
      unitPrice:
        minutes === 0 ? 0 : (visit.overrides?.normalPerHour ?? visit.edition.labour.normalPerHour),
      cost: multiplyDivide(job.labourCostPerHour, job.accessMinutes, 60),
      reasons: [
        worked,
        spared ? 'Nothing found: not billed by the shop’s rule' : accessReason(rule),
      ],
    }),
  ];
}

function billedAccess(rule: AccessRule, minutes: number): number {
  if (rule.bill === 'never') return 0;
  return rule.bill === 'all' ? minutes : Math.max(0, minutes - rule.allowanceMinutes);
}

function accessReason(rule: AccessRule): string {
  if (rule.bill === 'never') return 'Access is not billed';
  if (rule.bill === 'all') return 'Access is billed to the minute';
  return `Access is billed beyond ${rule.allowanceMinutes} minutes a machine`;
}
