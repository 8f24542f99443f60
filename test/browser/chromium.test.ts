import { afterEach, expect, test, vi } from 'vitest';
import { chromiumPath, launchChromium } from './chromium.ts';

afterEach(() => vi.unstubAllEnvs());

test('the browser that is named is taken, or missed in words', () => {
  vi.stubEnv('OVERBRIM_CHROMIUM', '/no/such/browser');
  expect(() => chromiumPath()).toThrow(
    'OVERBRIM_CHROMIUM names /no/such/browser, which is no program; set it to a Chromium or leave it out.',
  );
  vi.stubEnv('OVERBRIM_CHROMIUM', process.execPath);
  expect(chromiumPath()).toBe(process.execPath);
});

test('the browser that is found opens a page', async () => {
  const browser = await launchChromium();
  try {
    const page = await browser.newPage();
    await page.setContent('<p>water</p>');
    expect(await page.textContent('p')).toBe('water');
  } finally {
    await browser.close();
  }
});
