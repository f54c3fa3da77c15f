import { cleanup, configure } from '@testing-library/react';
import { afterEach, beforeEach, expect, vi } from 'vitest';

// Roles are computed in jsdom slowly, and the machine may be busy with other tests.
vi.setConfig({ testTimeout: 60_000 });
configure({ asyncUtilTimeout: 20_000 });

// What the browser has and jsdom lacks, as far as the primitives use it.
class NoResizeObserver implements ResizeObserver {
  observe() {}
  unobserve() {}
  disconnect() {}
}
globalThis.ResizeObserver ??= NoResizeObserver;
Element.prototype.scrollIntoView ??= () => undefined;
Element.prototype.hasPointerCapture ??= () => false;
Element.prototype.setPointerCapture ??= () => undefined;
Element.prototype.releasePointerCapture ??= () => undefined;
window.scrollTo = () => undefined;
// Nothing is laid out here: every element is as large as a chart, so that charts draw.
Element.prototype.getBoundingClientRect = () => new DOMRect(0, 0, 640, 320);

const errors: unknown[][] = [];

beforeEach(() => {
  errors.length = 0;
  vi.spyOn(console, 'error').mockImplementation((...args: unknown[]) => {
    errors.push(args);
  });
});

/** A message on the console is a failure, whatever else the test looked at. */
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
  expect(errors).toEqual([]);
});
