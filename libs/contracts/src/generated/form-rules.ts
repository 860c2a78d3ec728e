// Written by `npm run contracts` from the contracts: do not edit by hand.

export interface FieldRule {
  required?: true;
  minLength?: number;
  maxLength?: number;
  min?: number;
  max?: number;
  pattern?: string;
  email?: true;
}

export const formRules: Record<string, Record<string, FieldRule>> = {
  'session.signIn': {"email":{"required":true,"maxLength":254},"password":{"required":true,"minLength":1,"maxLength":128},"code":{"pattern":"^\\d{6}$"}},
  'session.switch': {"membershipId":{"required":true}},
  'shops.signUp': {"shopName":{"required":true,"minLength":1,"maxLength":120},"name":{"required":true,"minLength":1,"maxLength":120},"email":{"required":true,"maxLength":254},"password":{"required":true,"minLength":8,"maxLength":128},"zone":{"required":true,"maxLength":64},"currency":{"required":true,"pattern":"^[A-Z]{3}$"},"locale":{"pattern":"^[a-z]{2,3}(-[A-Z]{2})?$"}},
  'account.verifyEmail': {"token":{"required":true,"pattern":"^[A-Za-z0-9_-]{43}$"}},
  'account.requestReset': {"email":{"required":true,"maxLength":254}},
  'account.reset': {"token":{"required":true,"pattern":"^[A-Za-z0-9_-]{43}$"},"password":{"required":true,"minLength":8,"maxLength":128}},
  'account.change': {"name":{"required":true,"minLength":1,"maxLength":120}},
  'account.changePassword': {"current":{"required":true,"minLength":1,"maxLength":128},"password":{"required":true,"minLength":8,"maxLength":128}},
  'account.confirmTotp': {"code":{"required":true,"pattern":"^\\d{6}$"}},
  'account.removeTotp': {"code":{"required":true,"pattern":"^\\d{6}$"}},
  'invitations.send': {"role":{"required":true},"email":{"required":true,"maxLength":254},"name":{"required":true,"minLength":1,"maxLength":120},"clientId":{},"storeId":{}},
  'invitations.accept': {"name":{"minLength":1,"maxLength":120},"password":{"minLength":8,"maxLength":128}},
  'crew.change': {"role":{},"initials":{"minLength":1,"maxLength":4},"van":{"minLength":0,"maxLength":40},"costPerHour":{"min":0,"max":1000000000000}},
  'subscription.choose': {"planId":{"required":true}},
  'consents.give': {"hours":{"required":true,"min":1,"max":168}},
  'platform.changePlan': {"planId":{"required":true},"note":{"maxLength":500}},
  'platform.pause': {"note":{"maxLength":500}},
  'platform.resume': {"note":{"maxLength":500}},
  'platform.cancel': {"note":{"maxLength":500}},
  'platform.createPlan': {"code":{"required":true,"pattern":"^[a-z][a-z0-9-]{1,39}$"},"name":{"required":true,"minLength":1,"maxLength":60},"monthlyAmount":{"required":true,"min":0,"max":1000000000000},"currency":{"required":true,"pattern":"^[A-Z]{3}$"},"storeLimit":{"required":true,"min":1,"max":100000},"machineLimit":{"required":true,"min":1,"max":1000000},"crewLimit":{"required":true,"min":1,"max":10000},"trialDays":{"required":true,"min":0,"max":365},"graceDays":{"required":true,"min":0,"max":90},"offered":{"required":true}},
  'platform.editPlan': {"name":{"minLength":1,"maxLength":60},"monthlyAmount":{"min":0,"max":1000000000000},"currency":{"pattern":"^[A-Z]{3}$"},"storeLimit":{"min":1,"max":100000},"machineLimit":{"min":1,"max":1000000},"crewLimit":{"min":1,"max":10000},"trialDays":{"min":0,"max":365},"graceDays":{"min":0,"max":90},"offered":{}},
  'platform.decideMail': {"decision":{"required":true}},
  'shop.change': {"name":{"minLength":1,"maxLength":120},"currency":{"pattern":"^[A-Z]{3}$"},"zone":{"maxLength":64},"locale":{"pattern":"^[a-z]{2,3}(-[A-Z]{2})?$"},"address":{"maxLength":300},"taxNumber":{"minLength":0,"maxLength":40},"phone":{"maxLength":40,"pattern":"^\\+?[0-9 ()./-]{3,40}$"},"mailName":{"minLength":0,"maxLength":80},"replyTo":{"maxLength":254},"statementDay":{"min":1,"max":28},"statementHour":{"min":0,"max":23},"closeBySchedule":{},"termsDays":{"min":0,"max":120},"lateChargeBasisPoints":{"min":0,"max":10000},"lateChargeDayCount":{}},
  'clients.create': {"name":{"required":true,"minLength":1,"maxLength":120},"termsDays":{"min":0,"max":120},"taxExempt":{},"taxExemptReference":{"minLength":0,"maxLength":80},"overrides":{},"note":{"maxLength":2000},"number":{"minLength":1,"maxLength":20}},
  'clients.change': {"name":{"minLength":1,"maxLength":120},"termsDays":{"min":0,"max":120},"taxExempt":{},"taxExemptReference":{"minLength":0,"maxLength":80},"overrides":{},"note":{"maxLength":2000},"number":{"minLength":1,"maxLength":20}},
  'stores.create': {"name":{"required":true,"minLength":1,"maxLength":120},"address":{"maxLength":300},"zone":{"maxLength":64},"hours":{"maxLength":200},"accessWords":{"maxLength":1000},"taxPlace":{"minLength":0,"maxLength":80},"tripPlace":{"minLength":0,"maxLength":80},"tripMetres":{"min":0,"max":2000000},"cardValue":{"min":0,"max":1000000000000},"clientId":{"required":true},"number":{"minLength":1,"maxLength":20}},
  'stores.change': {"name":{"minLength":1,"maxLength":120},"address":{"maxLength":300},"zone":{"maxLength":64},"hours":{"maxLength":200},"accessWords":{"maxLength":1000},"taxPlace":{"minLength":0,"maxLength":80},"tripPlace":{"minLength":0,"maxLength":80},"tripMetres":{"min":0,"max":2000000},"cardValue":{"min":0,"max":1000000000000},"number":{"minLength":1,"maxLength":20}},
  'contacts.create': {"name":{"required":true,"minLength":1,"maxLength":120},"email":{"maxLength":254},"phone":{"maxLength":40,"pattern":"^\\+?[0-9 ()./-]{3,40}$"},"getsStatements":{},"getsVisits":{},"clientId":{"required":true},"storeId":{}},
  'contacts.change': {"name":{"minLength":1,"maxLength":120},"email":{"maxLength":254},"phone":{"maxLength":40,"pattern":"^\\+?[0-9 ()./-]{3,40}$"},"getsStatements":{},"getsVisits":{}},
  'banks.create': {"letter":{"required":true,"pattern":"^[A-Z]{1,2}$"},"words":{"maxLength":120}},
  'banks.change': {"letter":{"pattern":"^[A-Z]{1,2}$"},"words":{"maxLength":120}},
  'machines.create': {"kind":{"required":true},"energy":{},"make":{"minLength":0,"maxLength":60},"model":{"minLength":0,"maxLength":60},"serial":{"minLength":0,"maxLength":60},"builtOn":{},"installedOn":{},"volts":{"min":1,"max":1000},"amps":{"min":0,"max":1000},"vendPrice":{"min":0,"max":1000000000000},"cyclesADay":{"min":0,"max":1000},"supplierWarrantyUntil":{},"note":{"maxLength":2000},"bankId":{"required":true},"bayNumber":{"min":1,"max":999},"state":{}},
  'machines.change': {"kind":{},"energy":{},"make":{"minLength":0,"maxLength":60},"model":{"minLength":0,"maxLength":60},"serial":{"minLength":0,"maxLength":60},"builtOn":{},"installedOn":{},"volts":{"min":1,"max":1000},"amps":{"min":0,"max":1000},"vendPrice":{"min":0,"max":1000000000000},"cyclesADay":{"min":0,"max":1000},"supplierWarrantyUntil":{},"note":{"maxLength":2000}},
  'machines.setState': {"state":{"required":true},"words":{"maxLength":500}},
  'machines.retire': {"words":{"maxLength":500}},
  'machines.move': {"bankId":{"required":true},"bayNumber":{"required":true,"min":1,"max":999}},
  'conditions.create': {"storeId":{"required":true},"machineId":{},"kind":{"required":true},"words":{"required":true,"minLength":1,"maxLength":500},"extraMinutes":{"min":0,"max":480},"tool":{"minLength":0,"maxLength":120}},
  'conditions.change': {"kind":{},"words":{"minLength":1,"maxLength":500},"extraMinutes":{"min":0,"max":480},"tool":{"minLength":0,"maxLength":120}},
  'editions.create': {"validFrom":{"required":true},"note":{"maxLength":500},"book":{"required":true}},
  'parts.create': {"number":{"required":true,"minLength":1,"maxLength":60},"name":{"required":true,"minLength":1,"maxLength":160},"category":{"required":true,"minLength":1,"maxLength":40},"unitCost":{"required":true,"min":0,"max":1000000000000},"fixedPrice":{"min":0,"max":1000000000000},"makersPart":{},"scarce":{},"supplier":{"minLength":0,"maxLength":80},"supersededBy":{}},
  'parts.change': {"number":{"minLength":1,"maxLength":60},"name":{"minLength":1,"maxLength":160},"category":{"minLength":1,"maxLength":40},"unitCost":{"min":0,"max":1000000000000},"fixedPrice":{"min":0,"max":1000000000000},"makersPart":{},"scarce":{},"supplier":{"minLength":0,"maxLength":80},"supersededBy":{}},
  'files.add': {"id":{},"ownerKind":{"required":true},"ownerId":{"required":true}},
  'imports.start': {"id":{},"kind":{"required":true}},
  'calls.report': {"storeId":{"required":true},"machineId":{},"symptom":{"required":true},"words":{"maxLength":1000},"reportedBy":{"minLength":1,"maxLength":120}},
  'calls.change': {"machineId":{},"symptom":{},"words":{"maxLength":1000}},
  'calls.withdraw': {"words":{"maxLength":500}},
  'visits.plan': {"storeId":{"required":true},"plannedOn":{"required":true},"window":{},"techMembershipId":{},"callIds":{},"reason":{"maxLength":500}},
  'visits.change': {"plannedOn":{},"window":{},"techMembershipId":{},"callIds":{},"reason":{"maxLength":500}},
  'visits.cancel': {"words":{"maxLength":500}},
  'acts.record': {"acts":{"required":true}},
  'rulings.confirm': {"lines":{"required":true}},
  'rulings.overrule': {"lines":{"required":true},"bearer":{"required":true},"why":{"required":true,"minLength":3,"maxLength":500}},
  'tickets.signOff': {"total":{"min":-1000000000000,"max":1000000000000}},
  'contracts.create': {"name":{"required":true,"minLength":1,"maxLength":120},"rule":{"required":true,"minLength":4,"maxLength":200},"startsOn":{"required":true},"endsOn":{},"startTime":{"pattern":"^([01]\\d|2[0-3]):[0-5]\\d$"},"shift":{},"coverage":{"required":true},"techMembershipId":{},"stores":{"required":true},"clientId":{"required":true}},
  'contracts.change': {"name":{"required":true,"minLength":1,"maxLength":120},"rule":{"required":true,"minLength":4,"maxLength":200},"startsOn":{"required":true},"endsOn":{},"startTime":{"pattern":"^([01]\\d|2[0-3]):[0-5]\\d$"},"shift":{},"coverage":{"required":true},"techMembershipId":{},"stores":{"required":true}},
  'contracts.end': {"endsOn":{"required":true}},
  'statements.close': {"month":{"required":true,"pattern":"^\\d{4}-(0[1-9]|1[0-2])$"}},
  'payments.record': {"storeId":{"required":true},"method":{"required":true},"amount":{"required":true,"min":1,"max":1000000000000},"receivedOn":{"required":true},"words":{"maxLength":200}},
  'payments.startCard': {"statementId":{},"storeId":{},"amount":{"min":1,"max":1000000000000}},
  'deliveries.decide': {"decision":{"required":true}},
};
