import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { listenForInterrupt } from '../../src/cli/interrupt.js';

describe('listenForInterrupt', () => {
  const exit = vi.spyOn(process, 'exit').mockImplementation((() => undefined) as never);
  beforeEach(() => {
    vi.useFakeTimers({ toFake: ['performance'] });
    exit.mockClear();
  });
  afterEach(() => {
    vi.useRealTimers();
  });

  it.each(['SIGINT', 'SIGTERM'] as const)('%s aborts once; a later second one quits with 130', (name) => {
    let told = 0;
    const { signal, release } = listenForInterrupt(() => told++);
    process.emit(name, name);
    expect({ aborted: signal.aborted, told, exits: exit.mock.calls }).toEqual({ aborted: true, told: 1, exits: [] });
    // npm passes on the Ctrl-C that the terminal has sent already.
    vi.advanceTimersByTime(50);
    process.emit(name, name);
    expect(exit.mock.calls).toEqual([]);
    vi.advanceTimersByTime(2000);
    process.emit(name, name);
    expect(exit.mock.calls).toEqual([[130]]);
    expect(told).toBe(1);
    release();
  });

  it('gives the signals back', () => {
    const before = process.listenerCount('SIGINT');
    listenForInterrupt(() => {}).release();
    expect(process.listenerCount('SIGINT')).toBe(before);
  });
});
