import { describe, expect, test } from 'vitest';
import { createGate, GateFullError } from '#server/files/gate.ts';

/** Work that ends when it is told to. */
function held(): { readonly work: () => Promise<void>; readonly end: () => void; readonly fail: () => void } {
  let end = (): void => undefined;
  let fail = (): void => undefined;
  const over = new Promise<void>((resolve, reject) => {
    end = resolve;
    fail = () => reject(new Error('failed'));
  });
  return { work: () => over, end: () => end(), fail: () => fail() };
}

const SOON = Symbol('not yet');
const settled = async (promise: Promise<unknown>): Promise<boolean> => (await Promise.race([promise, new Promise((resolve) => setImmediate(() => resolve(SOON)))])) !== SOON;

describe('a gate', () => {
  test('lets through as much as there is room for, then what waits, the urgent first', async () => {
    const gate = createGate(2, 5);
    const [first, second] = [held(), held()];
    const order: string[] = [];
    const one = gate.pass(first.work);
    const two = gate.pass(second.work);
    const later = gate.pass(() => Promise.resolve(order.push('later')));
    const urgent = gate.pass(() => Promise.resolve(order.push('urgent')), { urgent: true });
    expect(await settled(later)).toBe(false);
    first.end();
    await Promise.all([one, later, urgent]);
    expect(order).toEqual(['urgent', 'later']);
    second.end();
    await two;
  });

  test('lets what is heavy through alone, and what is heavier than all its room too', async () => {
    const gate = createGate(2, 5);
    const light = held();
    const heavy = held();
    const first = gate.pass(light.work);
    const alone = gate.pass(heavy.work, { weight: 5 });
    const behind = gate.pass(() => Promise.resolve('done'));
    expect(await settled(behind)).toBe(false);
    light.end();
    await first;
    expect(await settled(behind)).toBe(false);
    heavy.end();
    await alone;
    expect(await behind).toBe('done');
  });

  test('is left by what fails', async () => {
    const gate = createGate(1, 5);
    const bad = held();
    const first = gate.pass(bad.work);
    const next = gate.pass(() => Promise.resolve('done'));
    bad.fail();
    await expect(first).rejects.toThrow('failed');
    expect(await next).toBe('done');
  });

  test('refuses what is urgent once as much waits as may, and takes it again after', async () => {
    const gate = createGate(1, 1);
    const first = held();
    const one = gate.pass(first.work);
    const waiting = gate.pass(() => Promise.resolve('waited'), { urgent: true });
    await expect(gate.pass(() => Promise.resolve('never'), { urgent: true })).rejects.toBeInstanceOf(GateFullError);
    first.end();
    await one;
    expect(await waiting).toBe('waited');
    expect(await gate.pass(() => Promise.resolve('again'), { urgent: true })).toBe('again');
  });
});
