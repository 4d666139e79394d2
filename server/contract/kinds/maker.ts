import { z } from 'zod';
import { CalendarYear, kindForm, Label, OptionalLabel, OptionalProse } from './kind.ts';

export const maker = kindForm({
  kind: 'maker',
  name: 'Maker',
  names: 'Makers',
  about: 'Who built machines or poured iron, and how they signed it.',
  page: 'maker',
  payload: z
    .strictObject({
      name: Label,
      place: OptionalLabel,
      buildsMachines: z.boolean(),
      poursIron: z.boolean(),
      foundryMark: OptionalLabel,
      founded: CalendarYear.nullable(),
      closed: CalendarYear.nullable(),
      note: OptionalProse,
    })
    .refine(({ buildsMachines, poursIron }) => buildsMachines || poursIron, { error: 'A maker builds machines, pours iron, or does both', path: ['buildsMachines'] })
    .refine(({ poursIron, foundryMark }) => poursIron || foundryMark === null, { error: 'Only who pours iron has a foundry mark', path: ['foundryMark'] })
    .refine(({ founded, closed }) => founded === null || closed === null || founded <= closed, { error: 'Closed before it was founded', path: ['closed'] }),
  fields: [
    { key: 'name', label: 'Name', control: 'line' },
    { key: 'place', label: 'Place', control: 'line', optional: true },
    { key: 'buildsMachines', label: 'Built machines', control: 'yes-no' },
    { key: 'poursIron', label: 'Poured iron', hint: 'For its own machines or for others', control: 'yes-no' },
    { key: 'foundryMark', label: 'Foundry mark', hint: 'How its castings are signed, in words', control: 'line', optional: true },
    { key: 'founded', label: 'Founded', hint: 'Year', control: 'number', optional: true },
    { key: 'closed', label: 'Closed', hint: 'Year', control: 'number', optional: true },
    { key: 'note', label: 'Note', control: 'prose', optional: true },
  ],
});
