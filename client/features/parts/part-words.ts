import type { PartItem, PartPage } from '#contract/parts.ts';
import { sayCount } from '../../lib/say-number.ts';

const VISIBILITIES: Readonly<Record<PartItem['visibility'], string>> = {
  private: 'Private',
  'by-link': 'By link',
  public: 'Public',
};

const WHO_SEES: Readonly<Record<PartItem['visibility'], string>> = {
  private: 'Only you see it.',
  'by-link': 'Whoever has its address sees it.',
  public: 'Everybody sees it, without your note and with the last digits of the serial masked.',
};

export function sayVisibility(visibility: PartItem['visibility']): string {
  return VISIBILITIES[visibility];
}

export function sayWhoSees(visibility: PartItem['visibility']): string {
  return WHO_SEES[visibility];
}

/** `Gear case, Brackwater Tractor Works`. */
export function sayPart({ title, maker }: Pick<PartItem, 'title' | 'maker'>): string {
  return maker === null ? title : `${title}, ${maker.name}`;
}

/** Where a part is: `on the bench`, `30 Crawler 3C 1204, gear case`. */
export function sayPlace({ fittedTo }: Pick<PartItem, 'fittedTo'>): string {
  return fittedTo === null ? 'on the bench' : `${fittedTo.model.name} ${fittedTo.serial}, ${fittedTo.position.toLowerCase()}`;
}

/** `two marks`, `one mark`, `no mark yet`. */
export function sayMarks({ marks }: Pick<PartPage, 'marks'>): string {
  if (marks.length === 0) return 'no mark yet';
  return marks.length === 1 ? 'one mark' : `${sayCount(marks.length)} marks`;
}
