import { describe, expect, test } from 'vitest';
import { noAnswers } from '../../src/model/answers.ts';
import { run } from '../../src/pipeline.ts';
import { plainText } from '../../src/schedule/text-line.ts';
import { twinsResult, twinsText } from '../../src/schedule/twins.ts';
import { twins } from '../../src/study/twins.ts';
import { idOf, modelOf } from '../support/model-of.ts';
import { codeOf, names } from '../support/run-sketch.ts';
import { sketch } from '../support/sketch.ts';
import { sampleText } from '../support/study-samples.ts';

const outcomeOf = (text: string) => run(modelOf(sketch(text)), codeOf('npc-2020'), noAnswers, names);
const school = sampleText('school');
const relief = 'place washroom as S4 at 0 0 10.2\n';
const sound = school.replace(relief, `${relief}place relief as S4 at 0 0 10.2\n`);

const sentences = (text: string): string[] =>
  twinsResult(outcomeOf(text)).flatMap(({ odd }) => odd.map(({ sentence }) => sentence));

describe('the school: four storeys alike, but storey 4 lacks its relief vent and storey 1 has the mop sink', () => {
  test('each difference is told once, of its storey', () => {
    expect(sentences(school)).toEqual([
      'Storey 1 is not like Storey 2 and Storey 3: it has 1 mop sink more.',
      'Storey 4 is not like Storey 2 and Storey 3: it lacks a relief vent (S2.RV-S2.VJ) that they have and 7 traps are vented by a wet vent, there vented by a circuit vent.',
    ]);
  });
  test('what is missing is named by the pipe of its twin', () => {
    const drawing = sketch(school);
    const [storeys] = twinsResult(outcomeOf(school));
    expect(storeys!.odd[1]!.about[0]).toBe(idOf(drawing, 'S2.RV-S2.VJ'));
  });
  test('with the relief vent only the mop sink is left', () => {
    expect(sentences(sound)).toEqual(['Storey 1 is not like Storey 2, Storey 3 and Storey 4: it has 1 mop sink more.']);
  });
  test('any one relief vent left out is found on its storey', () => {
    for (const storey of [2, 3]) {
      const text = sound.replace(`place relief as S${storey} at 0 0 ${(storey - 1) * 3.4}\n`, '');
      expect(text).not.toBe(sound);
      expect(
        sentences(text).filter((one) => one.includes('relief vent')),
        `storey ${storey}`,
      ).toEqual([expect.stringMatching(new RegExp(`^Storey ${storey} is not like`))]);
    }
  });
});

describe('the core of five storeys', () => {
  const core = sampleText('five-storey-core');
  test('storeys 2 to 5 are alike, though the stacks end above the fifth', () =>
    expect(twins(outcomeOf(core))).toEqual([]));
  test('one pipe of another size is told with both sizes', () => {
    const text = core
      .replace('place west as A3 at 0 0 6.4', 'place west3 as A3 at 0 0 6.4')
      .replace(
        '# Washrooms on the east side',
        `${westWith(core, 'drain 3 in: WC1 > C1 > WJ', 'drain 4 in: WC1 > C1 > WJ')}\n# Washrooms on the east side`,
      );
    expect(sentences(text).join(' ')).toContain('A3.C1-A3.WJ is 4 in, there 3 in');
  });
});

/** The block of the west side under another name, with one line changed. */
function westWith(text: string, from: string, to: string): string {
  const block = /typical west\n[\s\S]*?\nend\n/.exec(text)![0];
  expect(block).toContain(from);
  return block.replace('typical west', 'typical west3').replace(from, to);
}

test('a building without parts that repeat has none', () => {
  for (const name of ['dwelling', 'bathroom-group', 'sports-hall', 'hall-wet-vented'])
    expect(twins(outcomeOf(sampleText(name))), name).toEqual([]);
});

test('a person reads one line a part', () => {
  const text = plainText(twinsText(twinsResult(outcomeOf(school))));
  expect(text.match(/is not like/g)).toHaveLength(2);
  expect(text).toMatch(/^ {2}Twins/);
});
