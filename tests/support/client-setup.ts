import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach, expect, vi } from 'vitest';

/** The browser has it, the test's window doesn't: nothing in it ever changes size. */
class StillObserver implements ResizeObserver {
  observe(): void {}
  unobserve(): void {}
  disconnect(): void {}
}

/** What a test writes to the console unasked is a fault of the code it tests. */
const complaints: unknown[][] = [];

beforeEach(() => {
  // Anew each time: a test that takes its own stand-ins away takes this one too.
  vi.stubGlobal('ResizeObserver', StillObserver);
  complaints.length = 0;
  for (const level of ['error', 'warn'] as const) vi.spyOn(console, level).mockImplementation((...said: unknown[]) => complaints.push(said));
});

afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  expect(complaints).toEqual([]);
});
