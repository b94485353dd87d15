import { keyMatches } from '../model/answer-keys.ts';
import type { Element } from '../model/model.ts';
import type { Outcome } from '../verdicts/outcome.ts';
import type { ResultAnswer } from './result.ts';

/** What the user answered, one entry a fact, in the order of the answers file; settings stand apart. */
export function resultAnswers({ answers, model }: Outcome): ResultAnswer[] {
  const meets = (key: string, fits: (element: Element) => boolean): number =>
    model.elements.filter((element) => fits(element) && keyMatches(key, element)).length;
  const facts = (part: 'fixtures' | 'pipes', key: string, answer: object, prefix = ''): ResultAnswer[] =>
    Object.entries(answer).flatMap(([field, value]): ResultAnswer[] => {
      if (typeof value === 'object' && value !== null) return facts(part, key, value, `${prefix}${field}.`);
      if (value === undefined) return [];
      const isPipe = part === 'pipes';
      const count = meets(key, ({ kind }) => (kind === 'segment') === isPipe);
      return [{ part, key, field: `${prefix}${field}`, value, meets: count }];
    });
  const whole = (part: ResultAnswer['part'], keys: readonly string[]): ResultAnswer[] =>
    keys.map((key) => ({ part, key, field: null, value: true, meets: 1 }));
  return [
    ...whole('sewerEnds', answers.sewerEnds),
    ...[...answers.fixtures].flatMap(([key, answer]) => facts('fixtures', key, answer)),
    ...[...answers.pipes].flatMap(([key, answer]) => facts('pipes', key, answer)),
    ...[...answers.batteries].map(
      ([key, { reading }]): ResultAnswer => ({ part: 'batteries', key, field: 'reading', value: reading, meets: 1 }),
    ),
    ...whole('leaveOut', answers.leaveOut).map((one) => ({
      ...one,
      key: model.systems.find(({ globalId }) => globalId === one.key)?.name ?? one.key,
    })),
    ...whole('cleanouts', answers.cleanouts),
  ];
}
