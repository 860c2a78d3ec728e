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
  'invitations.accept': {"name":{"minLength":1,"maxLength":120},"password":{"minLength":8,"maxLength":128}},
  'account.change': {"name":{"required":true,"minLength":1,"maxLength":120}},
  'account.changePassword': {"current":{"required":true,"minLength":1,"maxLength":128},"password":{"required":true,"minLength":8,"maxLength":128}},
  'account.confirmTotp': {"code":{"required":true,"pattern":"^\\d{6}$"}},
  'account.removeTotp': {"code":{"required":true,"pattern":"^\\d{6}$"}},
};
