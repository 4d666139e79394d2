import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach, expect, vi } from 'vitest';

/** The browser has it, the test's window doesn't: nothing in it ever changes size. */
class StillObserver implements ResizeObserver {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
}
vi.stubGlobal('ResizeObserver', StillObserver);

/** What a test writes to the console unasked is a fault of the code it tests. */
const complaints: unknown[][] = [];

beforeEach(() => {
  complaints.length = 0;
  for (const level of ['error', 'warn'] as const) vi.spyOn(console, level).mockImplementation((...said: unknown[]) => complaints.push(said));
});

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  expect(complaints).toEqual([]);
});
