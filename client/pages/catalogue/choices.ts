import { useQuery } from '@tanstack/react-query';
import { makersToChoose, modelsToChoose } from '../../features/decode/decode-queries.ts';
import { partTypesToChoose } from '../../features/part-types/part-types-queries.ts';
import type { Choice } from './list-filters.tsx';

/** What filters choose from; undefined while it is on its way, or where it failed: the list itself still works. */

export function useMakerChoices(): readonly Choice[] | undefined {
  return useQuery(makersToChoose()).data?.map(({ slug, name }) => ({ value: slug, text: name }));
}

/** Models of one maker, or of all with their makers' names. */
export function useModelChoices(maker: string | undefined): readonly Choice[] | undefined {
  return useQuery(modelsToChoose())
    .data?.filter((model) => maker === undefined || model.maker.slug === maker)
    .map(({ slug, name, maker: { name: makerName } }) => ({
      value: slug,
      text: maker === undefined ? `${name}, ${makerName}` : name,
    }));
}

export function usePartTypeChoices(): readonly Choice[] | undefined {
  return useQuery(partTypesToChoose()).data?.map(({ slug, name }) => ({ value: slug, text: name }));
}
