import { describe, expect, test } from 'vitest';
import { checkText } from '../../src/schedule/check-text.ts';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { runSketch } from '../support/run-sketch.ts';

// A lavatory and a thing nobody named on one branch to a 3 in building drain. NPC 2020, Table 2.4.9.3.: the heaviest
// reading of an unidentified fixture is a closet; a pipe with a closet is 3 in at least (2.4.9.2.), whatever its load.
const drawn = (kind: string): string => `
model "One thing"
storey "Ground floor" at 0
node J at 0 0 -0.3
node TL from J west 0.4 rise 1:50
lavatory L from TL up 0.6, trap 1 1/4 in
trap TL
drain 1 1/4 in: L > TL > J
node TX from J south 0.4 rise 1:50
${kind} X from TX up 0.3, trap 2 in
trap TX
drain 2 in: X > TX > J
drain 2 in: J > K (east 1 fall 1:50)
drain 4 in: K > OUT (east 4 fall 1:50)
sewer OUT
vent 2 in: J > TOP (to 4)
terminal TOP
`;

describe('one fixture that nothing identifies', () => {
  const { result, pipe, fixture } = runSketch(drawn('thing'));
  const text = plainText(checkText(result)).replace(/\s+/g, ' ');
  const story = (name: string): string => explain(result, findInResult(result, name), []).story.join(' ');

  test('the model leaves its load open', () => {
    const { kind, load } = fixture('X');
    expect(kind).toBeNull();
    expect(load.most).toBeGreaterThan(load.least);
  });
  test('its own drain hangs on it: 2 in is too small for a closet', () => {
    const { verdict, required, modelled } = pipe('TX-J');
    expect([modelled?.label, required?.most?.label, verdict]).toEqual(['2 in', '3 in', 'unknown']);
    expect(text).toMatch(/verdicts? hangs? on it:.*TX-J #\d+: drawn 2 in, needs [^:]*3 in/);
    expect(story('TX-J')).toContain('Its verdict is open: at the lightest reading of X it needs');
  });
  test('what the lavatory alone uses holds whatever it is', () => {
    expect(pipe('TL-J').required?.least).toEqual(pipe('TL-J').required?.most);
    expect(story('TL-J')).not.toContain('may be');
    expect(text).toMatch(
      /Open: 1 fixture may be read more than one way - X #\d+: [0-9.]+ to [0-9.]+ fixture units Either way: \d+ undersized, \d+ as required/,
    );
  });
  test('once it is known, nothing is open', () => {
    const known = runSketch(drawn('thing'), {
      answers: { fixtures: new Map([['name:X', { kind: 'lavatory' }]]) },
    });
    expect(known.pipe('TX-J').verdict).not.toBe('unknown');
    expect(plainText(checkText(known.result))).not.toContain('Open:');
  });
});

describe('a finding that only one reading has', () => {
  // UPC 2024, Table 1002.2: a 2 in trap stands at most 5 ft (1.52 m) from its vent, a closet 6 ft (1.83 m).
  const arm = (metres: number): string =>
    drawn('thing').replace('node TX from J south 0.4', `node TX from J south ${metres}`);
  const tooLong = (metres: number, answers = {}) =>
    runSketch(arm(metres), { code: 'upc-2024', answers })
      .findings('trap-arm-too-long')
      .map(({ severity, facts, sentence }) => ({ severity, onlyIf: facts.onlyIf, sentence }));

  test('1.4 m: no reading has it', () => expect(tooLong(1.4)).toEqual([]));
  test('1.7 m: what is no closet has it; it warns, and says so', () => {
    const [one, ...more] = tooLong(1.7);
    expect(more).toEqual([]);
    expect(one).toMatchObject({ severity: 'warning', onlyIf: ['lightest', 'heaviest'] });
    expect(one!.sentence).toMatch(/at most 1.52 m .* Only at the lightest or the heaviest reading of what is open\.$/);
  });
  test('1.7 m, once it is known: an error, or nothing', () => {
    const as = (kind: string) => tooLong(1.7, { fixtures: new Map([['name:X', { kind }]]) });
    expect(as('sink').map(({ severity, onlyIf }) => [severity, onlyIf])).toEqual([['error', undefined]]);
    expect(as('water-closet')).toEqual([]);
  });
  test('2 m: every reading has it, whichever limit it breaks: one error', () => {
    expect(tooLong(2).map(({ severity, onlyIf }) => [severity, onlyIf])).toEqual([['error', undefined]]);
  });
});

describe('the same in the result', () => {
  const { result } = runSketch(drawn('thing'));
  const byVerdict = (holds: boolean) =>
    result.pipes.filter(({ verdict }) => (verdict !== 'unknown') === holds).map(({ name }) => name);

  test('verdicts that hold either way, and those that hang on the thing', () => {
    expect(byVerdict(true)).toEqual(['L-TL', 'TL-J', 'K-OUT', 'J-TOP']);
    expect(byVerdict(false)).toEqual(['X-TX', 'TX-J', 'J-K']);
    for (const { required, modelled, reason, verdict } of result.pipes) {
      const [least, most, drawnSize] = [required!.least!.dn, required!.most!.dn, modelled!.dn];
      expect(verdict === 'unknown').toBe(least <= drawnSize && drawnSize < most);
      if (verdict === 'unknown') expect(reason).toBe('depends on a fixture that is not identified');
    }
  });
  test('what would settle it stands with the fixture', () => {
    expect(result.fixtures.map(({ name, open }) => [name, open?.[0]?.field])).toEqual([
      ['L', undefined],
      ['X', 'kind'],
    ]);
  });
});
