import { handle } from '../../core/http/route';
import { callCardService } from './card-calls';
import { connectCardAccount, showConnection } from './card-account';
import { listPayments, showPayment } from './read-payments';
import { recordPayment } from './record-payment';
import { settleCardPayment } from './settle-card-payment';
import { startCardPayment } from './start-card-payment';

export const paymentsRoutes = [
  handle('payments.list', (context, { query }) => listPayments(context, query)),
  handle('payments.show', (context, { params }) => showPayment(context, params.paymentId)),
  handle('payments.record', (context, { body }) => recordPayment(context, body)),
  handle('payments.startCard', (context, { body }) => startCardPayment(context, body)),
  handle('payments.check', async (context, { params }) => {
    const payment = await showPayment(context, params.paymentId);
    if (payment.method === 'card') {
      await callCardService(() => settleCardPayment(context, { id: payment.id }));
    }
    return showPayment(context, params.paymentId);
  }),
  handle('payments.connection', (context) => showConnection(context)),
  handle('payments.connect', (context) => connectCardAccount(context)),
];
