// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { listAll } from '#client/lib/list-all.ts';

describe('listAll', () => {
  it('follows the cursors to the end', async () => {
    const asked: (string | undefined)[] = [];
    const items = await listAll((after) => {
      asked.push(after);
      const page = Number(after ?? 0);
      return Promise.resolve({ items: [page], next: page < 3 ? String(page + 1) : null });
    });
    expect(items).toEqual([0, 1, 2, 3]);
    expect(asked).toEqual([undefined, '1', '2', '3']);
  });
  it('gives up on a list without an end', async () => {
    await expect(listAll(() => Promise.resolve({ items: ['x'], next: 'again' }))).resolves.toHaveLength(20);
  });
  it('passes a failure on', async () => {
    await expect(listAll(() => Promise.reject(new Error('away')))).rejects.toThrow('away');
  });
});
