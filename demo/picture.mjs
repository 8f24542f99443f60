// Takes the picture of the README from the running demo: `npm start`, then `node demo/picture.mjs [ADDRESS]`.
// OVERBRIM_CHROMIUM names another Chromium than the system's.
import { fileURLToPath } from 'node:url';
import { chromium } from 'playwright-core';

const address = process.argv[2] ?? 'http://127.0.0.1:8080/';
const file = fileURLToPath(new URL('picture.png', import.meta.url));
/** The road under the railway, and the middle of the picture, in the CRS of the town. */
const underpass = [471_180.5, 4_587_425.5];
const middle = [471_060, 4_587_040];
const metresAPixel = 1.75;

const browser = await chromium.launch({
  executablePath: process.env.OVERBRIM_CHROMIUM ?? '/usr/bin/chromium',
  args: ['--no-sandbox', '--disable-gpu'],
});
const page = await browser.newPage({ viewport: { width: 1060, height: 670 }, colorScheme: 'light' });
await page.goto(address);
await page.locator('brim-pour-points').getByRole('option').first().waitFor();
// The survey has moved the map to the whole town.
await page.waitForTimeout(1000);
const [left, top] = await page.evaluate(
  async ({ middle, metresAPixel, underpass }) => {
    const { map } = document.querySelector('brim-host').session.state;
    map.getView().setCenter(middle);
    map.getView().setResolution(metresAPixel);
    await new Promise((done) => map.once('rendercomplete', done));
    return map.getPixelFromCoordinate(underpass);
  },
  { middle, metresAPixel, underpass },
);
const map = await page.locator('#map').boundingBox();
await page.mouse.click(map.x + left, map.y + top);
await page.getByRole('button', { name: 'Trace its overflow' }).click();
await page.getByRole('list', { name: 'Legs, from the start' }).waitFor();
// The pond's own lines first, not the end of what was clicked.
await page
  .locator('brim-pour-points [part=detail]')
  .evaluate((detail) => detail.scrollIntoView({ block: 'start' }));
await page.mouse.move(map.x + 5, map.y + 5);
await page.waitForTimeout(1500);
await page.screenshot({ path: file });
await browser.close();
console.log(file);
