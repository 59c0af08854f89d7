import { HttpContextToken } from '@angular/common/http';

/** Set on a request whose caller deals with being signed out, so that nobody is sent to the sign-in page for it. */
export const LEAVES_PAGE_ALONE = new HttpContextToken(() => false);
