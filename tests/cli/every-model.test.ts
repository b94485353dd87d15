import { createHash } from 'node:crypto';
import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { readInput } from '../../src/cli/read-input.ts';
import { runModel, sha256 } from '../../src/cli/run-model.ts';
import { sizedIfc } from '../../src/cli/sized-ifc.ts';
import { indexLines } from '../../src/ifc/lines/index-lines.ts';
import { withoutOurLines } from '../../src/ifc/write/append-sets.ts';
import { answersForm } from '../../src/schedule/answers-form.ts';
import { checkText } from '../../src/schedule/check-text.ts';
import { explain } from '../../src/schedule/explain.ts';
import { findInResult } from '../../src/schedule/find-in-result.ts';
import { leanResult } from '../../src/schedule/lean-result.ts';
import { columnsOf } from '../../src/schedule/shown-text.ts';
import { surveyOf } from '../../src/schedule/survey.ts';
import { surveyText } from '../../src/schedule/survey-text.ts';
import { scratch } from '../support/program.ts';
import { type ModelFile, sampleModels, sharedModels } from '../support/real-models.ts';
import { faults } from '../support/schemas.ts';

// Every model, ours and other people's, through everything the commands do, by the published schemas.
const shared = sharedModels();
const models: readonly ModelFile[] = [...sampleModels(), ...(shared ?? [])];
const missing = shared === null ? ', without the shared ones: their folder is not here' : '';
const options = { code: 'npc-2020' };

describe(`${models.length} models${missing}`, () => {
  test('there are enough of them', () => expect(models.length).toBeGreaterThanOrEqual(shared === null ? 5 : 30));

  for (const { name, path } of models) {
    test(name, async () => {
      const { result, model, outcome, sizes } = await runModel([path], options);
      expect(faults('result', result)).toEqual([]);
      expect(faults('result', leanResult(result))).toEqual([]);

      const { counts } = result;
      const left = Object.values(counts.leftOut).reduce((sum, count) => sum + count, 0);
      const { elements, pipes, fittings, fixtures, terminals, unresolved } = counts;
      expect(pipes + fittings + fixtures + terminals + left + unresolved).toBe(elements);
      expect(result.elements).toHaveLength(elements);

      const survey = surveyOf(model, outcome.identities, result);
      expect(faults('survey', survey)).toEqual([]);
      expect(faults('answers', answersForm(survey.questions))).toEqual([]);
      for (const { globalId } of [...result.pipes.slice(0, 5), ...result.fixtures.slice(0, 5)])
        expect(faults('explain', explain(result, findInResult(result, globalId), sizes))).toEqual([]);

      const lines = [...checkText(result), ...surveyText(survey, result)].map(({ text }) => text);
      expect(lines.filter((text) => columnsOf(text) > 100)).toEqual([]);
      const isEmpty = result.fixtures.length + result.pipes.length === 0;
      expect(/no sanitary drainage in this model/.test(lines.slice(0, 2).join(' '))).toBe(isEmpty);
    });

    test(`${name}, sized: every byte stays, twice is once, and a packed copy holds the same`, async () => {
      const run = await runModel([path], options);
      const once = Buffer.concat(sizedIfc(run, run.files[0]!, 'out.ifc'));
      const original = Buffer.from(run.files[0]!.index.bytes);
      expect(Buffer.concat(withoutOurLines(indexLines(new Uint8Array(once)), sha256)).equals(original)).toBe(true);
      expect(run.result.model.sha256).toBe(createHash('sha256').update(original).digest('hex'));

      // The name stands in nothing that is written, so that a renamed copy is the same copy.
      const copy = join(scratch(), 'copy.ifc');
      writeFileSync(copy, once);
      const again = await runModel([copy], options);
      expect(again.result.model.sha256).toBe(run.result.model.sha256);
      expect(again.result.pipes).toEqual(run.result.pipes);
      expect(Buffer.concat(sizedIfc(again, again.files[0]!, 'out.ifc')).equals(once)).toBe(true);

      for (const out of ['out.ifc.gz', 'out.ifczip']) {
        const packed = join(scratch(), out);
        writeFileSync(packed, Buffer.concat(sizedIfc(run, run.files[0]!, out)));
        const { name: inside, index } = (await runModel([packed], options)).files[0]!;
        expect(inside).toBe('out.ifc');
        expect(Buffer.from(index.bytes).equals(once)).toBe(true);
      }
      expect((await readInput(path)).identity).not.toBeNull();
    });
  }
});
