import { configure, fireEvent, screen } from '@testing-library/react';
import { describe, expect, it } from 'vitest';
import { Component as MarkPage } from '#client/pages/marks/mark-page.tsx';
import { show, standInRegister } from '../moderation/register.tsx';
import { id } from '../moderation/samples.ts';
import { DISPUTED, mark, markPhoto, NO_RENDITIONS, photo, reading } from './samples.ts';

// Nothing here is hidden by a stylesheet, and asking each element whether it is takes most of the time.
configure({ defaultHidden: true });

const register = standInRegister();
const HERE = `/api/marks/${id(70)}`;
const open = () => show(<MarkPage />, { at: `/marks/${id(70)}`, path: '/marks/:id' });
const tell = (answer: unknown) => register.answer(`GET ${HERE}`, answer);
const press = (name: string) => fireEvent.click(screen.getByText(name, { selector: 'button' }));
/** What the rows of tables say in which a text stands. */
const rowsWith = (text: string) => [...document.querySelectorAll('tbody tr')].map(({ textContent }) => textContent).filter((said) => said.includes(text));

describe('what stands on a mark’s page', () => {
  it('shows the plate, what it can mean, where it was found and who read it', async () => {
    tell(mark());
    open();
    await screen.findByText(/^It can mean two dates\./);
    expect(screen.getAllByLabelText('Mark B, O or D, gap, B, O, gap, C, B')).toHaveLength(2);
    screen.getByRole('row', { name: '13 Jan 1941 1 in 2' });
    expect(screen.getByText('B4406, first pattern').getAttribute('href')).toBe('/castings/brackwater-b4406');
    screen.getByText('3C 12••');
    screen.getByRole('row', { name: /Harrow Lane 1 Mar 2026 yes/ });
    expect(screen.getAllByRole('link', { name: 'Gear case' })[0]?.getAttribute('href')).toBe(`/parts/${id(71)}`);
  });

  it('shows no dates while they are being worked out again', async () => {
    tell(mark({ workingOut: true }));
    open();
    await screen.findByText('Being worked out again.');
    expect(screen.queryByText(/It can mean/)).toBeNull();
  });

  it('says what nobody has read or dated yet', async () => {
    tell(mark({ reading: null, readings: [], dates: null, part: null, casting: null, machine: null, maker: null }));
    open();
    await screen.findByText('Not read yet');
    screen.getByText('Nobody has read it yet, so there is nothing to date.');
    screen.getByText('Nobody has read it yet.');
    screen.getByText('On a part by itself, whose casting is not known.');
  });

  it('has no dates where the mark is none', async () => {
    tell(mark({ kind: 'casting-number', dates: null }));
    open();
    await screen.findByText('Casting number, cast when poured');
    expect(screen.queryByText('What it can mean')).toBeNull();
  });

  it('is nothing at an address where no public mark is', async () => {
    open();
    await screen.findByText('Nothing stands at this address');
  });

  it('says how strong the evidence is and what would raise it', async () => {
    tell(mark({ evidence: 'claimed' }));
    open();
    await screen.findByText('Evidence: claimed');
    screen.getByText('A photo of the mark would raise it.');
  });
});

describe('its photos', () => {
  it('outlines where the mark stands, and offers AVIF before WebP', async () => {
    tell(mark({ photos: [markPhoto(1)] }));
    open();
    const picture = await screen.findByRole('img', { name: 'The mark' });
    expect(picture.getAttribute('srcset')).toBe('/photos/address/page-1600.webp 1600w');
    expect(picture.parentElement?.querySelector('source')?.getAttribute('srcset')).toBe('/photos/address/page-1600.avif 1600w');
    screen.getByText(/Where the mark stands is outlined\./);
    screen.getByRole('link', { name: 'Read this mark' });
  });

  it('says that a photo is being made ready, and why one can’t be shown', async () => {
    const waiting = markPhoto(1, { region: null, photo: photo(1, { state: 'waiting', renditions: NO_RENDITIONS }) });
    const failed = markPhoto(2, { photo: photo(2, { state: 'failed', failure: 'The picture is cut short.', renditions: NO_RENDITIONS }) });
    tell(mark({ photos: [waiting, failed] }));
    open();
    await screen.findByText('Being made ready');
    screen.getByText('The picture is cut short.');
    screen.getByText('Nobody has drawn yet where the mark stands.');
  });

  it('offers no reading from afar where there is no photo to read from', async () => {
    tell(mark());
    open();
    await screen.findByText('There is no photo of it. It can only be read where it is.');
    expect(screen.queryByRole('link', { name: 'Read this mark' })).toBeNull();
  });

  it('takes a photo off and puts it back where it was', async () => {
    const can = { read: true, change: true, remove: true };
    tell(mark({ can, photos: [markPhoto(1, { turn: 12 })] }));
    register.answer(`DELETE ${HERE}/photos/${id(1)}`, mark({ can }));
    register.answer(`PUT ${HERE}/photos/${id(1)}`, mark({ can, photos: [markPhoto(1, { turn: 12 })] }));
    open();
    fireEvent.click(await screen.findByRole('button', { name: 'Take this photo off the mark' }));
    await screen.findByText(/The photo is off the mark/);
    press('Put it back');
    await screen.findByRole('img', { name: 'The mark' });
    expect(register.sent.find(({ method }) => method === 'PUT')?.body).toEqual({ region: { left: 0.25, top: 0.5, width: 0.5, height: 0.25 }, turn: 12, mirrored: false });
  });
});

describe('how it is read', () => {
  it('says who read what at each place, how many agree and between which limits, and where they differ', async () => {
    tell(mark({ inForce: DISPUTED }));
    open();
    await screen.findByText('3 of 4 read all of it so; between 30 and 95 in 100 would.');
    screen.getByText('At one place they differ.');
    const [row = ''] = rowsWith('3 of 4 read B; between 30 and 95 in 100 would');
    for (const told of ['they differ', 'B: Harrow Lane, Una, Tom', '8: Esme']) expect(row).toContain(told);
    expect(rowsWith('4 of 4 read O')).toEqual([expect.not.stringContaining('they differ')]);
  });

  it('lists every reading with whether it counts, and why not', async () => {
    tell(
      mark({
        readings: [
          reading(81, { by: 'Una', independent: false }),
          reading(82, { by: 'Tom', takenBackAt: '2026-03-05T10:00:00Z' }),
          reading(83, { by: 'Esme', replaced: true }),
          reading(84, { by: 'Harrow Lane', asHolder: true }),
        ],
      }),
    );
    open();
    await screen.findByText('not by itself: its reader had seen what others read');
    screen.getByText('no: taken back 5 Mar 2026');
    screen.getByText('no: the same reader read it again');
    screen.getByText('Harrow Lane (held the part)');
    screen.getByText(/^No reading counts by itself/);
  });

  it('takes back a reading of one’s own, which can be read again', async () => {
    tell(mark({ photos: [markPhoto(1)], readings: [reading(81, { isMine: true }), reading(82, { by: 'Una' })] }));
    register.answer(`DELETE /api/readings/${id(81)}`, mark({ photos: [markPhoto(1)], readings: [reading(81, { isMine: true, takenBackAt: '2026-03-05T10:00:00Z' }), reading(82, { by: 'Una' })] }));
    open();
    fireEvent.click(await screen.findByRole('button', { name: 'Take it back' }));
    await screen.findByText(/Your reading is taken back\./);
    expect(screen.getByRole('link', { name: 'Read it again' }).getAttribute('href')).toBe(`/marks/${id(70)}/read`);
    screen.getByText('no: taken back 5 Mar 2026');
  });

  it('says what kept a reading from being taken back', async () => {
    tell(mark({ readings: [reading(81, { isMine: true })] }));
    register.refuse(`DELETE /api/readings/${id(81)}`, 503, 'unavailable', 'Away');
    open();
    fireEvent.click(await screen.findByRole('button', { name: 'Take it back' }));
    await screen.findByText('The register is away for a moment');
    screen.getByRole('button', { name: 'Take it back' });
  });
});

describe('a mark to be read first', () => {
  const kept = { hidden: true, reading: null, readings: [], dates: null, part: null, casting: null, machine: null, inForce: null, photos: [markPhoto(1)] };

  it('says no word of what others read, and offers to read it', async () => {
    tell(mark(kept));
    open();
    await screen.findByRole('heading', { level: 1, name: 'A mark to read' });
    expect(screen.getByRole('link', { name: 'Read it first' }).getAttribute('href')).toBe(`/marks/${id(70)}/read`);
    for (const told of ['What it can mean', 'All readings', 'Where it was found', 'How it is read']) expect(screen.queryByText(told)).toBeNull();
  });

  it('shows them once asked, after saying what that costs', async () => {
    tell(mark(kept));
    register.answer(`POST ${HERE}/looks`, mark({ photos: [markPhoto(1)] }));
    open();
    await screen.findByText(/no longer counts as independent/);
    press('Show me what others read');
    await screen.findByText('All readings');
  });

  it('stays as it is where asking fails', async () => {
    tell(mark(kept));
    register.refuse(`POST ${HERE}/looks`, 429, 'too-many-requests', 'Slowly');
    open();
    await screen.findByText(/no longer counts as independent/);
    press('Show me what others read');
    await screen.findByText('Too many questions at once');
    screen.getByRole('link', { name: 'Read it first' });
  });
});

describe('what its holder can do', () => {
  const can = { read: true, change: true, remove: true };

  it('says what it is now where it was changed meanwhile, and keeps what was chosen', async () => {
    tell(mark({ can }));
    register.refuse(`PUT ${HERE}`, 409, 'conflict', 'Changed');
    open();
    fireEvent.click(await screen.findByRole('button', { name: 'Say otherwise what it is' }));
    fireEvent.click(screen.getByRole('radio', { name: 'Stamped' }));
    tell(mark({ can, kind: 'serial', revision: 2 }));
    press('Save it');
    await screen.findByText(/is now on record as: serial, cast when poured/);
    expect(screen.getByRole<HTMLInputElement>('radio', { name: 'Stamped' }).checked).toBe(true);
    register.answer(`PUT ${HERE}`, mark({ can, technique: 'stamped', revision: 3 }));
    press('Save it');
    await screen.findByText('Date mark, stamped after machining');
    expect(register.sent.filter(({ method }) => method === 'PUT').map(({ body }) => body)).toEqual([
      { kind: 'date-code', technique: 'stamped', revision: 1 },
      { kind: 'date-code', technique: 'stamped', revision: 2 },
    ]);
  });

  it('says why a mark that others have read stays', async () => {
    tell(mark({ can }));
    register.refuse(`DELETE ${HERE}`, 409, 'conflict', 'Una has read it: make the part private instead.');
    open();
    fireEvent.click(await screen.findByRole('button', { name: 'Take it off the record' }));
    press('Take it off for good');
    await screen.findByText('Una has read it: make the part private instead.');
  });
});
