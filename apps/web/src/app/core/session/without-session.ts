import { HttpContextToken } from '@angular/common/http';

/** For calls that stand before or outside a session: no token, and no renewing when refused. */
export const withoutSession = new HttpContextToken<boolean>(() => false);
