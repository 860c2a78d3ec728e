import { handle } from '../../core/http/route';
import { changeName, showAccount } from './account';
import { changePassword } from './change-password';
import { confirmCodes, removeCodes, startCodes } from './one-time-codes';
import { renewRecoveryCodes } from './renew-recovery-codes';
import { completeReset, requestReset } from './reset-password';

export const accountRoutes = [
  handle('account.show', (context) => showAccount(context)),
  handle('account.change', (context, { version, body }) => changeName(context, version, body.name)),
  handle('account.changePassword', (context, { body }) => changePassword(context, body)),
  handle('account.requestReset', (context, { body }) => requestReset(context, body.email)),
  handle('account.reset', (context, { body }) => completeReset(context, body)),
  handle('account.startTotp', (context) => startCodes(context)),
  handle('account.confirmTotp', (context, { body }) => confirmCodes(context, body.code)),
  handle('account.removeTotp', (context, { body }) => removeCodes(context, body.code)),
  handle('account.renewRecoveryCodes', (context, { body }) =>
    renewRecoveryCodes(context, body.password),
  ),
];
