import sharp from 'sharp';
import type { Browser, Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, beforeEach, describe, expect, inject, it } from 'vitest';
import { drawPhoto } from '#fixtures/photos/draw-photo.ts';
import { HANDS } from '#fixtures/photos/hand.ts';
import { expectOnlyRefusals, signInOn, useSitePeople } from '#tests/support/browser-people.ts';
import { axeFindings, openBrowser, overflows, SCREENS, visit } from '#tests/support/browser.ts';
import type { Visit } from '#tests/support/browser.ts';

const people = useSitePeople();
let browser: Browser;
let here: Visit;

beforeAll(async () => {
  browser = await openBrowser();
});
afterAll(() => browser.close());
beforeEach(async () => {
  here = await visit(browser, inject('baseUrl'));
});
afterEach(() => here.end());

const PICTURE = { width: 1200, height: 800 };
/** How far left and right of its middle a raised bar stands in the picture. */
const FLANK = 200;

/** A grey plate with a soft, brighter bar standing upright in its middle; no two are the same bytes. */
async function drawPicture(mark: string): Promise<string> {
  const { width, height } = PICTURE;
  const bar = `<rect x="${width / 2 - FLANK}" y="0" width="${2 * FLANK}" height="${height}" fill="#a0a0a0"/>`;
  const plate = `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}"><desc>${mark}</desc><rect width="100%" height="100%" fill="#606060"/>${bar}</svg>`;
  const png = await sharp(Buffer.from(plate)).blur(6).png().withExifMerge({ IFD0: { ImageDescription: mark } }).toBuffer();
  return png.toString('base64');
}

/** Puts a Brackwater part with a photographed mark that nobody has read on record, as whoever is signed in on the page; answers the mark's id. */
async function recordMark(page: Page, called: string): Promise<string> {
  return page.evaluate(
    async ({ picture, title }) => {
      const call = async (method: string, path: string, body?: unknown): Promise<unknown> => {
        const form = body instanceof FormData;
        const response = await fetch(`/api${path}`, {
          method,
          ...(body === undefined ? {} : { body: form ? body : JSON.stringify(body) }),
          ...(form || body === undefined ? {} : { headers: { 'Content-Type': 'application/json' } }),
        });
        if (!response.ok) throw new Error(`${method} ${path}: ${response.status} ${await response.text()}`);
        return response.json();
      };
      const bytes = Uint8Array.from(atob(picture), (character) => character.charCodeAt(0));
      const form = new FormData();
      form.set('photo', new File([bytes], 'barn.png', { type: 'image/png' }));
      const photo = (await call('POST', '/photos', form)) as { id: string };
      const makers = (await call('GET', '/makers')) as { items: { id: string; slug: string }[] };
      const part = (await call('POST', '/parts', {
        partTypeId: null,
        called: title,
        makerId: makers.items.find(({ slug }) => slug === 'brackwater-tractor-works')?.id ?? null,
        foundModelId: null,
        foundSerial: null,
        condition: null,
        note: null,
        visibility: 'public',
        photoIds: [photo.id],
        number: null,
      })) as { id: string };
      const placing = { photoId: photo.id, region: null, turn: 0, mirrored: false };
      const mark = (await call('POST', `/parts/${part.id}/marks`, { kind: 'date-code', technique: 'cast', photos: [placing], reading: null })) as { id: string };
      return mark.id;
    },
    { picture: await drawPicture(called), title: called },
  );
}

async function asMember(page: Page, displayName: string): Promise<void> {
  const { email } = await people.addMember({ displayName });
  await signInOn(page, email);
}
async function openDesk(page: Page, mark: string): Promise<void> {
  await page.goto(`/marks/${mark}/read`);
  // Its first rendition may still be on the way.
  await page.getByRole('img', { name: /^Photo, / }).waitFor();
}
const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click();
const plate = (page: Page) => page.getByRole('textbox', { name: 'Date mark, as you see it' });
const isPressed = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).getAttribute('aria-pressed');

/** Drawing by the processor makes the browser write that reading the picture back takes time; that is no fault of the page. */
const faultsOf = (complaints: readonly string[]) => complaints.filter((line) => !/GL Driver Message.*ReadPixels/.test(line));

/** How bright the stage is at the two flanks of the bar, left and right. */
async function flanks(page: Page): Promise<readonly [left: number, right: number]> {
  const shot = await page.locator('canvas').screenshot();
  const { data, info } = await sharp(shot).greyscale().raw().toBuffer({ resolveWithObject: true });
  const scale = Math.min(info.width / PICTURE.width, info.height / PICTURE.height);
  const at = (x: number) => {
    let sum = 0;
    for (let y = Math.round(info.height * 0.45); y < info.height * 0.55; y += 1) sum += data[y * info.width * info.channels + Math.round(x) * info.channels] ?? 0;
    return sum / (info.height * 0.1);
  };
  return [at(info.width / 2 - FLANK * scale), at(info.width / 2 + FLANK * scale)];
}

describe('the reading screen', () => {
  it('takes a member from the photo to a date: light, outline, plate, what would settle it; a reload loses nothing', async () => {
    const { page, complaints } = here;
    await asMember(page, 'Bay Tollgate');
    const mark = await recordMark(page, 'Block under the bench');
    await openDesk(page, mark);
    await page.getByText('As taken', { exact: true }).first().waitFor();

    // Raised iron is bright on the side that faces the light, and dark on the other.
    await press(page, 'Relief');
    await page.getByText('Relief, light from upper left').waitFor();
    const light = page.getByRole('slider', { name: 'Light from' });
    await light.fill('270');
    await page.getByText('Relief, light from the left').waitFor();
    await expect.poll(() => flanks(page).then(([left, right]) => left - right)).toBeGreaterThan(40);
    await light.fill('90');
    await expect.poll(() => flanks(page).then(([left, right]) => left - right)).toBeLessThan(-40);

    await press(page, 'Draw where it stands');
    await page.keyboard.press('ArrowRight');
    await page.keyboard.press('Shift+ArrowDown');
    await plate(page).fill('LL?CB');
    await page.getByText('If the third letter were read for certain', { exact: false }).first().waitFor();
    expect(await page.locator('.plate-tile.is-lit').getAttribute('data-tile')).toBe('2');
    await page.getByText('kept as you type').waitFor();

    await page.reload();
    await page.getByText('Relief, light from the right').waitFor();
    expect(await plate(page).inputValue()).toBe('LL?CB');
    expect(await isPressed(page, 'Relief')).toBe('true');
    await press(page, 'show as taken');
    expect(await isPressed(page, 'As taken')).toBe('true');
    expect(await axeFindings(page)).toEqual([]);

    // The outline drawn before the reload is still being drawn.
    await page.getByRole('group', { name: 'The photo of the mark' }).focus();
    await page.keyboard.press('Enter');
    await page.getByRole('button', { name: 'Draw where it stands' }).waitFor();

    await plate(page).fill('LLKCB');
    await page.getByText('25 Feb 1941').first().waitFor();
    await press(page, 'Save this reading');
    await page.waitForURL(`**/marks/${mark}`);
    await page.getByRole('heading', { level: 1 }).waitFor();
    expect(faultsOf(complaints)).toEqual([]);

    await openDesk(page, mark);
    expect(await page.getByRole('button', { name: 'Larger' }).isVisible()).toBe(true);
    expect(await plate(page).inputValue()).toBe('LLKCB');
    await page.getByText('You have read it before.').waitFor();
  });

  it('goes from a photo as the demo draws them, sent from the bench, to the date that stands on it', async () => {
    const { page, complaints } = here;
    const line = { name: 'date', text: 'LLKCB', height: 130, relief: 'raised', missing: [] } as const;
    const { jpeg } = await drawPhoto({
      name: 'block', seed: 41, width: 640, height: 480, lines: [line], hand: HANDS[0]!, surface: 'rusty', paint: 0,
      light: { azimuth: 225, elevation: 20 }, turn: 8, blur: 0.6, glare: false, wear: 0.2,
    });
    await asMember(page, 'Barn Bramble');
    await page.goto('/bench/new');
    await page.getByLabel('Photos from this device').setInputFiles([{ name: 'barn.jpg', mimeType: 'image/jpeg', buffer: jpeg }]);
    await page.locator('img[alt="Photo 1"][src*="/thumb-"]').waitFor();
    await page.getByRole('combobox', { name: 'Maker' }).fill('Brackwater');
    await page.getByRole('option', { name: 'Brackwater Tractor Works' }).click();
    await press(page, 'Put it on record');
    await page.getByRole('link', { name: 'Add a mark' }).click();
    await page.getByLabel('Kind of mark').selectOption('date-code');
    await press(page, 'Put it on record and read it');
    await page.waitForURL(/\/marks\/[^/]+\/read$/);
    await page.getByRole('img', { name: /^Photo, / }).waitFor();
    await plate(page).fill(line.text);
    await page.getByText('25 Feb 1941').first().waitFor();
    await press(page, 'Save this reading');
    await page.getByRole('heading', { name: 'What it can mean' }).waitFor();
    await page.getByRole('rowheader', { name: '25 Feb 1941' }).waitFor();
    expect(faultsOf(complaints)).toEqual([]);
  });

  it('keeps from a second reader what the first read, on a phone, until theirs is saved', async () => {
    await asMember(here.page, 'First Fern');
    const mark = await recordMark(here.page, 'Block behind the barn');
    await openDesk(here.page, mark);
    await plate(here.page).fill('LLKCB');
    await press(here.page, 'Save this reading');
    await here.page.waitForURL(`**/marks/${mark}`);

    const phone = await visit(browser, inject('baseUrl'), SCREENS.phone);
    try {
      const { page, complaints } = phone;
      await asMember(page, 'Second Sorrel');
      await openDesk(page, mark);
      await page.getByText('You read it without seeing what others read', { exact: false }).waitFor();
      await plate(page).fill('LLKCR');
      await page.getByText('kept as you type').waitFor();
      const shown = await page.locator('main').innerText();
      expect(shown).not.toMatch(/LLKCB|1941|First Fern|Block behind the barn|Brackwater/);
      expect(await page.getByRole('button', { name: 'Draw where it stands' }).count()).toBe(0);
      expect(await overflows(page)).toBe(false);
      expect(await axeFindings(page)).toEqual([]);
      await press(page, 'Save this reading');
      await page.waitForURL(`**/marks/${mark}`);
      await page.getByText('First Fern').first().waitFor();
      expect(faultsOf(complaints)).toEqual([]);
    } finally {
      await phone.end();
    }
  });

  it('sends a visitor to sign in and back, and finds nothing where no mark is', async () => {
    const { page, complaints } = here;
    const address = '/marks/018d5bbd-2920-72c2-a4c4-26dc00009999/read';
    await page.goto(address);
    await page.getByRole('main').getByRole('link', { name: 'Sign in' }).waitFor();
    const { email } = await people.addMember({ displayName: 'Lost Larch' });
    await signInOn(page, email);
    await page.goto(address);
    await page.getByRole('heading', { level: 1, name: 'Nothing stands at this address' }).waitFor();
    expectOnlyRefusals(complaints);
  });
});
