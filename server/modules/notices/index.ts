export { mails } from './mails';
export { createNotices, notify, sendMailLater, type NewNotice, type Notices } from './notices-service';
export { forgetNotices } from './notices-repository';
export { registerNoticesRoutes } from './notices-routes';
