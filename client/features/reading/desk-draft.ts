import { z } from 'zod';
import type { ReadingDesk } from '#contract/marks.ts';
import { Region } from '#contract/parts.ts';
import { View } from './view.ts';

/** What a reader has said and set at one desk, kept until it is saved. Photos by their ids. */
export const DeskDraft = z.object({
  text: z.string(),
  /** The photo that is looked at; null: the first. */
  photoId: z.string().nullable(),
  views: z.record(z.string(), View),
  /** Where the mark stands, drawn and not saved yet. */
  regions: z.record(z.string(), Region),
});
export type DeskDraft = z.infer<typeof DeskDraft>;

/** A bare plate; or one's own reading that stands, to be mended. */
export function newDeskDraft({ mine }: Pick<ReadingDesk, 'mine'>): DeskDraft {
  return { text: mine?.text ?? '', photoId: null, views: {}, regions: {} };
}

export function withView(draft: DeskDraft, photoId: string, view: View): DeskDraft {
  return { ...draft, views: { ...draft.views, [photoId]: view } };
}

/** `region` null: nothing is being drawn on the photo any more. */
export function withRegion(draft: DeskDraft, photoId: string, region: Region | null): DeskDraft {
  const { [photoId]: _, ...others } = draft.regions;
  return { ...draft, regions: region === null ? others : { ...others, [photoId]: region } };
}
