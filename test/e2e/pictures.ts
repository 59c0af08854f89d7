import { chromium, type Browser, type Page } from '@playwright/test';
import { mkdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import * as z from 'zod';
import type { AssignmentDto, LiftDto, TakeDto, UserDto } from '../../server/contract';
import { Caller } from '../support/caller';
import { screens, type Screen, type ScreenIds } from './support/screens';

/**
 * Takes a picture of every screen of the demo that runs (`npm start`), on a phone and a laptop, light and dark:
 * `npm run pictures -- OUT_DIR [URL] [STORAGE_DIR]`.
 */
const [outDir = 'test-results/pictures', url = 'http://127.0.0.1:4300', storageDir = 'storage'] =
  process.argv.slice(2);

const SIZES = { phone: { width: 390, height: 844 }, laptop: { width: 1440, height: 900 } } as const;
const Accounts = z.array(
  z.object({ name: z.string(), role: z.string(), email: z.string(), password: z.string() }),
);

async function people(): Promise<Record<'member' | 'coach' | 'owner', Caller>> {
  const accounts = Accounts.parse(JSON.parse(await readFile(join(storageDir, 'demo-accounts.json'), 'utf8')));
  const signIn = async (role: string) => {
    const account = accounts.find((one) => one.role === role);
    if (!account) throw new Error(`the demo has no ${role}`);
    const caller = new Caller(url);
    await caller.signIn(account.email, account.password);
    return caller;
  };
  return { member: await signIn('member'), coach: await signIn('coach'), owner: await signIn('owner') };
}

async function idsOf(who: Awaited<ReturnType<typeof people>>): Promise<ScreenIds> {
  const { items: takes } = await who.member.get<{ items: TakeDto[] }>('/api/takes');
  const { items: assignments } = await who.member.get<{ items: AssignmentDto[] }>('/api/assignments');
  const { items: lifts } = await who.coach.get<{ items: LiftDto[] }>('/api/lifts');
  const me = await who.member.get<{ user: UserDto }>('/api/me');
  const need = <T>(value: T | undefined, what: string): T => {
    if (value === undefined) throw new Error(`the demo has no ${what}`);
    return value;
  };
  const waiting = need(
    takes.find((take) => take.state === 'waiting'),
    'waiting take',
  );
  return {
    liftId: need(
      lifts.find((lift) => lift.id === waiting.lift.id),
      'lift',
    ).id,
    assignmentId: need(assignments.find((one) => one.myTakes.length === 0) ?? assignments[0], 'assignment')
      .id,
    waitingId: waiting.id,
    answeredId: need(
      takes.find((take) => take.state === 'answered'),
      'answered take',
    ).id,
    memberId: me.user.id,
  };
}

async function shoot(
  browser: Browser,
  screen: Screen,
  api: Caller | null,
  size: keyof typeof SIZES,
  theme: 'light' | 'dark',
) {
  const context = await browser.newContext({
    viewport: SIZES[size],
    colorScheme: theme,
    isMobile: size === 'phone',
    timezoneId: 'Europe/Stockholm',
    locale: 'en-GB',
  });
  if (api) await context.addCookies([...api.cookies].map(([name, value]) => ({ name, value, url })));
  const page: Page = await context.newPage();
  await page.goto(url + screen.path);
  await page.locator('h1').first().waitFor();
  const read = page.getByRole('button', { name: 'I have read this' });
  if (screen.who === 'member' && (await read.count()) > 0) await read.click();
  // Clips and posters come a moment after the page.
  await page.waitForTimeout(1500);
  await page.screenshot({ path: join(outDir, `${screen.name}-${size}-${theme}.png`) });
  await context.close();
}

await mkdir(outDir, { recursive: true });
const who = await people();
const ids = await idsOf(who);
const browser = await chromium.launch({
  executablePath: '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu'],
});
try {
  for (const screen of screens(ids)) {
    const api = screen.who === 'nobody' ? null : who[screen.who];
    for (const size of ['phone', 'laptop'] as const) {
      for (const theme of ['light', 'dark'] as const) await shoot(browser, screen, api, size, theme);
    }
    console.log(screen.name);
  }
} finally {
  await browser.close();
}
