// What is said aloud: together, once, and again when it is said again.
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';

import { Announcer } from '../../src/app/announcer.svelte';

describe('announcer', () => {
  beforeEach(() => {
    vi.useFakeTimers();
  });
  afterEach(() => {
    vi.useRealTimers();
  });

  it('says what comes within a short while together', () => {
    const announcer = new Announcer(100);
    announcer.say('Undone: Insert line.');
    announcer.say('1 line recalculated.');
    announcer.say('1 line recalculated.');
    expect(announcer.text).toBe('');
    vi.advanceTimersByTime(100);
    expect(announcer.text).toBe('Undone: Insert line. 1 line recalculated.');
  });

  it('keeps to the last three sentences', () => {
    const announcer = new Announcer(100);
    for (const sentence of ['One.', 'Two.', 'Three.', 'Four.']) announcer.say(sentence);
    announcer.flush();
    expect(announcer.text).toBe('Two. Three. Four.');
  });

  it('changes the text when the same is said again, so that it is heard again', () => {
    const announcer = new Announcer(0);
    announcer.say('Nothing to undo.');
    announcer.flush();
    const before = announcer.text;
    announcer.say('Nothing to undo.');
    announcer.flush();
    expect(announcer.text).not.toBe(before);
    expect(announcer.text.trim()).toBe(before);
  });

  it('says nothing of nothing', () => {
    const announcer = new Announcer(0);
    announcer.say('');
    announcer.flush();
    expect(announcer.text).toBe('');
  });
});
