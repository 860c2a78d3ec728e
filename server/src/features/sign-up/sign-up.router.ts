import { handle } from '../../core/http/route';
import { openShop } from './open-shop';
import { requestSignUp } from './request-sign-up';

export const signUpRoutes = [
  handle('shops.signUp', (context, { body }) => requestSignUp(context, body)),
  handle('account.verifyEmail', (context, { body }) => openShop(context, body.token)),
];
