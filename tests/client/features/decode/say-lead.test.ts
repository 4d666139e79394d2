// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { sayAcceptedLead, sayLeadDays } from '#client/features/decode/say-lead.ts';

describe('sayLeadDays', () => {
  it.each([
    [28, 56, '28–56 days before it was built'],
    [1, 1, 'one day before it was built'],
    [0, 0, 'on the day it was built'],
    [0, 30, '0–30 days before it was built'],
    [-266, -238, '8–9 months after it was built'],
    [-250, -245, 'about 8 months after it was built'],
    [-20, 8, 'between 8 days before and 20 days after it was built'],
    [-5, 0, 'up to 5 days after it was built'],
    [1000, 1100, 'about 3 years before it was built'],
    [-5000, -4000, '11–14 years after it was built'],
  ])('%i to %i days', (least, most, said) => {
    expect(sayLeadDays({ least, most })).toBe(said);
  });
});

describe('sayAcceptedLead', () => {
  it('says both ends, or that there is no upper one', () => {
    expect(sayAcceptedLead({ least: 0, most: 365 })).toBe('0–365 days');
    expect(sayAcceptedLead({ least: 1, most: null })).toBe('from one day, with no upper end');
  });
});
