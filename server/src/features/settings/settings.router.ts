import { handle } from '../../core/http/route';
import { changeSettings, finishSetUp, showSettings } from './settings';

export const settingsRoutes = [
  handle('shop.show', (context) => showSettings(context)),
  handle('shop.change', (context, { version, body }) => changeSettings(context, version, body)),
  handle('settings.finishSetUp', (context) => finishSetUp(context)),
];
