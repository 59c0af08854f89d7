import { expect, test, type Browser, type BrowserContext, type Page } from '@playwright/test';
import axe, { type AxeResults } from 'axe-core';
import type { Caller } from '../support/caller';
import { screens, type Screen, type ScreenIds } from './support/screens';
import { stageUrl } from './support/stage-access';
import { answeredTake, filmedTake, makeWorld, type World } from './support/world';

const SIZES = {
  phone: { width: 390, height: 844 },
  laptop: { width: 1440, height: 900 },
} as const;

let world: World;
let ids: ScreenIds;

test.beforeAll(async () => {
  test.setTimeout(180_000);
  world = await makeWorld();
  const first = await filmedTake(world.member, world.assignment.id);
  await answeredTake(world.coach, first);
  const second = await filmedTake(world.member, world.assignment.id);
  ids = {
    liftId: world.lift.id,
    assignmentId: world.assignment.id,
    waitingId: second.id,
    answeredId: first.id,
    memberId: world.member.id,
  };
});

async function signedIn(context: BrowserContext, api: Caller | null): Promise<void> {
  if (!api) return;
  await context.addCookies(
    [...api.cookies].map(([name, value]) => ({
      name,
      value,
      url: stageUrl(),
      httpOnly: name !== 'XSRF-TOKEN',
    })),
  );
}

const apiOf = (screen: Screen): Caller | null => (screen.who === 'nobody' ? null : world[screen.who].api);

/** Opens a screen and waits until it has said what it has to say. */
async function openScreen(page: Page, screen: Screen): Promise<void> {
  await page.goto(stageUrl() + screen.path);
  const heading = page.locator('h1').first();
  await expect(heading).toBeVisible();
  if (screen.who === 'member' && (await heading.textContent())?.includes('Before you film')) {
    await page.getByRole('button', { name: 'I have read this' }).click();
    await expect(page.getByRole('heading', { name: 'Before you film' })).toHaveCount(0);
  }
  await expect(page.getByRole('status').filter({ hasText: /^(Fetching|Loading|Looking up)/ })).toHaveCount(0);
  await expect(page.locator('mf-skeleton')).toHaveCount(0);
}

async function seriousFindings(page: Page): Promise<string[]> {
  // As tall as the page, so that nothing is measured where it only scrolls past a bar that stays.
  const size = page.viewportSize();
  const tall = await page.evaluate(() => document.documentElement.scrollHeight);
  if (size) await page.setViewportSize({ width: size.width, height: Math.max(size.height, tall) });
  await page.evaluate(axe.source);
  const violations = await page.evaluate(async () => {
    const loaded = (
      window as unknown as { axe: { run(root: Document, options: object): Promise<AxeResults> } }
    ).axe;
    const result = await loaded.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'],
    });
    return result.violations.map(({ id, impact, nodes }) => ({
      id,
      impact,
      where: nodes.slice(0, 3).map((node) => `${String(node.target)} ${node.failureSummary ?? ''}`),
    }));
  });
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, where }) => `${id}: ${where.join(' | ')}`);
}

async function tryEach(
  browser: Browser,
  size: keyof typeof SIZES,
  colorScheme: 'light' | 'dark',
): Promise<string[]> {
  const found: string[] = [];
  for (const screen of screens(ids)) {
    const context = await browser.newContext({
      viewport: SIZES[size],
      colorScheme,
      isMobile: size === 'phone',
    });
    await signedIn(context, apiOf(screen));
    const page = await context.newPage();
    page.on('pageerror', (error) => found.push(`${screen.name}: ${error.message}`));
    page.on('request', (request) => {
      const url = request.url();
      if (!url.startsWith(stageUrl()) && !/^(data|blob):/.test(url))
        found.push(`${screen.name} asked ${url}`);
    });
    await openScreen(page, screen);
    for (const finding of await seriousFindings(page)) found.push(`${screen.name}: ${finding}`);
    const [wide, room] = await page.evaluate(() => [
      document.documentElement.scrollWidth,
      document.documentElement.clientWidth,
    ]);
    if ((wide ?? 0) > (room ?? 0)) found.push(`${screen.name} is ${String(wide)} wide in ${String(room)}`);
    await context.close();
  }
  return found;
}

for (const size of ['phone', 'laptop'] as const) {
  for (const theme of ['light', 'dark'] as const) {
    test(`every screen on a ${size}, ${theme}: accessible, inside its width, without errors or outside requests`, async ({
      browser,
    }) => {
      test.setTimeout(300_000);
      expect(await tryEach(browser, size, theme)).toEqual([]);
    });
  }
}
