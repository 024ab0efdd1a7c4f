import type { Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { until } from '../support/person-session.ts';
import { openBrowser, picture, phone, signInAs, tablet } from './support/browser.ts';
import { readMail, startProduct, type Product } from './support/product.ts';

let product: Product;
let browser: Browser;

beforeAll(async () => {
  product = await startProduct();
  browser = await openBrowser();
}, 180_000);
afterAll(async () => {
  await browser.close();
  await product.stop();
});

describe('an asset engineer', () => {
  it('picks five spans from the list, assesses them, and reads why on the section page', async () => {
    const { page, faults, context } = await signInAs(browser, { url: product.url, name: 'Ines Halvorsen' });
    await page.getByLabel('Line, section or structures').fill('South Bay–Lantern Point');
    const boxes = page.getByRole('region', { name: 'Spans' }).getByRole('checkbox');
    await page.getByText('South Bay–Lantern Point').first().waitFor();
    await page.waitForFunction(() =>
      [...document.querySelectorAll('.list-panel li')].every((row) =>
        row.textContent?.includes('South Bay–Lantern Point'),
      ),
    );
    for (let index = 0; index < 5; index += 1) await boxes.nth(index).check();
    const tray = page.getByRole('region', { name: 'Picked spans' });
    await tray.getByText('5 spans picked').waitFor();
    await tray.getByText('20 span wires').waitFor();
    await picture(page, 'engineer-map');
    await tray.getByRole('button', { name: 'Assess' }).click();
    await tray.getByRole('link', { name: 'Open the assessment' }).waitFor({ timeout: 30_000 });
    await tray
      .getByText(/20 of 20|done/i)
      .first()
      .waitFor({ timeout: 60_000 });
    await picture(page, 'engineer-assessed');
    await tray.getByRole('link', { name: 'Open the assessment' }).click();
    await page.getByRole('heading', { name: /House basis/ }).waitFor();
    await picture(page, 'engineer-assessment');
    await page.goBack();
    await page.getByRole('link', { name: 'Open section' }).click();
    await page
      .getByText(/reaches .* limit/)
      .first()
      .waitFor();
    await page.getByRole('heading', { name: 'Bending stress at the clamps' }).waitFor();
    await page.locator('canvas').first().waitFor();
    await picture(page, 'engineer-section');
    for (const tab of ['Placements', 'Wires', 'History']) {
      await page.getByRole('tab', { name: tab }).click();
      await picture(page, `engineer-section-${tab.toLowerCase()}`);
    }
    expect(faults).toEqual([]);
    await context.close();
  });

  it('picks on the map by click and by box', async () => {
    const { page, context, faults } = await signInAs(browser, {
      url: product.url,
      name: 'Ines Halvorsen',
      path: '/?lat=-38.5&lng=-21&z=13',
    });
    await page.locator('.leaflet-marker-icon.structure').first().waitFor();
    await page.getByRole('button', { name: 'Box', exact: true }).click();
    const map = page.locator('.leaflet-container');
    const box = await map.boundingBox();
    if (box === null) throw new Error('the map is not there');
    const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
    await page.mouse.move(x - 150, y - 150);
    await page.mouse.down();
    await page.mouse.move(x + 150, y + 150, { steps: 5 });
    await page.mouse.up();
    await page.getByText(/[1-9]\d* spans? picked/).waitFor();
    await picture(page, 'engineer-map-near');
    await page.getByRole('button', { name: 'Clear' }).click();
    await page.getByRole('region', { name: 'Picked spans' }).waitFor({ state: 'detached' });
    const [middleX = 0, middleY = 0] = await page.evaluate(() => {
      const places = [...document.querySelectorAll('.leaflet-marker-icon.structure')].map((element) => element.getBoundingClientRect());
      const centre = (place: DOMRect) => [place.x + place.width / 2, place.y + place.height / 2] as const;
      const inside = places.map(centre).filter(([x, y]) => x > 500 && x < 1300 && y > 200 && y < 650);
      // Between two structures that stand next to each other runs a span.
      for (const [ax, ay] of inside) {
        const near = inside.filter(
          ([bx, by]) => Math.hypot(ax - bx, ay - by) < 32 && Math.hypot(ax - bx, ay - by) > 18,
        );
        const [other] = near;
        if (near.length === 2 && other !== undefined) return [(ax + other[0]) / 2, (ay + other[1]) / 2];
      }
      return [];
    });
    await page.mouse.click(middleX, middleY);
    await page.getByText(/[1-9]\d* spans? picked/).waitFor();
    expect(faults).toEqual([]);
    await context.close();
  });

  it('checks and imports a sample file, and sees what is wrong with a bad one', async () => {
    const { page, context } = await signInAs(browser, { url: product.url, name: 'Ines Halvorsen', path: '/import' });
    const bad =
      'record,line_name,voltage_kv,name,order,longitude_deg,latitude_deg,structure_kind,structure_height_m,ground_elevation_m,from_structure,to_structure,wire_kind,conductor,conductor_standard,tension_n\nstructure,New line,110,1,1,-21,-38.4,dead-end,-5,10,,,,,,\n';
    await page
      .locator('input[type=file]')
      .setInputFiles({ name: 'bad.csv', mimeType: 'text/csv', buffer: Buffer.from(bad) });
    await page.getByRole('button', { name: 'Check' }).click();
    await page.getByText('was refused; nothing was saved').waitFor();
    await page
      .getByRole('cell', { name: /structure_height_m/ })
      .first()
      .waitFor();
    await picture(page, 'engineer-import-refused');
    await page.locator('input[type=file]').setInputFiles('public/samples/surveyed-lines.geojson');
    await page.getByRole('button', { name: 'Import', exact: true }).click();
    await page.getByText('surveyed-lines.geojson is in').waitFor();
    await picture(page, 'engineer-import');
    await page.getByRole('link', { name: 'Show on the map' }).click();
    await page.waitForURL(/\/\?lat=/);
    await context.close();
  });
});

describe('a manager', () => {
  it('sorts and filters the risk table and opens the worst span', async () => {
    const { page, context, faults } = await signInAs(browser, { url: product.url, name: 'Amara Osei', path: '/risk' });
    await page.getByRole('row').nth(1).waitFor();
    await page.getByLabel('Urgent').check();
    await page.waitForURL(/grades=urgent/);
    await picture(page, 'manager-risk');
    await page.locator('tbody a').first().click();
    await page.waitForURL(/\/sections\//);
    await page
      .getByText(/reaches .* limit/)
      .first()
      .waitFor();
    expect(page.url()).toContain('/sections/');
    await page.goto(`${product.url}/import`);
    await page.getByText('Not for your role').waitFor();
    expect(faults).toEqual([]);
    await context.close();
  });
});

describe('a safety officer', () => {
  it('gets the e-mail, opens the span from it, and acknowledges', async () => {
    const mail = await until(
      () => readMail(product),
      (list) => list.some(({ to }) => to.includes('ruth.kealoha@tern.example')),
      60_000,
    );
    const message = mail.find(({ to }) => to.includes('ruth.kealoha@tern.example'));
    const link = /https?:\/\/\S+\/sections\/\S+/.exec(message?.text ?? '')?.[0] ?? '';
    const { page, context } = await signInAs(browser, {
      url: product.url,
      name: 'Ruth Kealoha',
      path: link.replace(product.url, ''),
    });
    await page
      .getByText(/reaches .* limit/)
      .first()
      .waitFor();
    await picture(page, 'safety-span');
    await page.goto(`${product.url}/alerts`);
    await page.getByRole('button', { name: 'Acknowledge' }).first().waitFor();
    await picture(page, 'safety-alerts');
    await page.getByLabel('Note').first().fill('Patrol sent');
    await page.getByRole('button', { name: 'Acknowledge' }).first().click();
    await page.getByRole('tab', { name: /Acknowledged/ }).click();
    await page.getByText('Patrol sent').waitFor();
    await context.close();
  });
});

describe('a crew member', () => {
  it('logs a fitted damper on a tablet and sees the new result beside the former one', async () => {
    const { page, context, faults } = await signInAs(browser, {
      url: product.url,
      name: 'Bo Lindqvist',
      viewport: tablet,
      path: '/field',
    });
    await page
      .getByRole('button', { name: /to fit/ })
      .first()
      .waitFor();
    await picture(page, 'crew-structures');
    await page
      .getByRole('button', { name: /to fit/ })
      .first()
      .click();
    await page.getByRole('button', { name: /Log/ }).first().click();
    await page.getByRole('button', { name: 'Log fitted damper' }).waitFor();
    await picture(page, 'crew-log');
    const small = await page
      .locator('.log-form button, .log-form .q-field')
      .evaluateAll((elements) =>
        elements.filter((element) => element.getBoundingClientRect().height < 44).map((element) => element.textContent),
      );
    expect(small).toEqual([]);
    await page.getByRole('button', { name: 'Log fitted damper' }).click();
    await page.getByRole('heading', { name: 'Now' }).waitFor();
    await page
      .getByText(/at the clamp, limit/)
      .nth(1)
      .waitFor({ timeout: 60_000 });
    await picture(page, 'crew-result');
    expect(faults).toEqual([]);
    await context.close();
  });

  it('can be used on a phone', async () => {
    const { page, context } = await signInAs(browser, {
      url: product.url,
      name: 'Bo Lindqvist',
      viewport: phone,
      path: '/field',
    });
    await page
      .getByRole('button', { name: /to fit/ })
      .first()
      .waitFor();
    const overflowPx = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
    expect(overflowPx).toBeLessThanOrEqual(0);
    await picture(page, 'crew-phone');
    await context.close();
  });
});
