import type { Page } from '@playwright/test';
import type { Person } from './world';
import { stageUrl } from './stage-access';

/** Signs a person in by the form. */
export async function signIn(page: Page, person: Pick<Person, 'email' | 'password'>): Promise<void> {
  await page.goto(`${stageUrl()}/sign-in`);
  await page.getByLabel('E-mail').fill(person.email);
  await page.getByLabel('Password', { exact: true }).fill(person.password);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.waitForURL((url) => !url.pathname.startsWith('/sign-in'));
}
