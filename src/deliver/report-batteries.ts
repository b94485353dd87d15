import { cavityDrawing } from '../schedule/cavity.ts';
import type { ResultBattery } from '../schedule/result.ts';
import { svgText } from '../schedule/svg-shape.ts';
import { countedKinds, plainWords, sentence } from '../schedule/trade-words.ts';
import { conditionsText } from '../schedule/understood-text.ts';
import type { WeighBattery } from '../schedule/weigh.ts';
import { englishWeigh } from '../schedule/weigh-english.ts';
import { weighRows } from '../schedule/weigh-rows.ts';
import { ventedText } from '../schedule/weigh-verdict.ts';
import { drawing, type Html, html, tag } from './html-element.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';

/** Each battery with its readings side by side and a cut through its wall; null where there is none. */
export function batterySections(source: ReportSource): Section | null {
  const { result, weighed } = source;
  if (result.batteries.length === 0) return null;
  return {
    id: 'batteries',
    title: 'Batteries, under each reading',
    parts: [
      weighed.length === 0
        ? tag('p', 'There are too many batteries to weigh here; the command weigh lays any of them side by side.')
        : html(
            'p',
            { class: 'quiet' },
            '* as modelled. Lengths are developed lengths; a reading that does not hold is not built.',
          ),
      ...result.batteries.flatMap((battery) => {
        const known = weighed.find(({ id }) => id === battery.id);
        return known === undefined ? readings(source, battery) : comparison(battery, known);
      }),
    ],
  };
}

function comparison({ why }: ResultBattery, battery: WeighBattery): Html[] {
  const { id, title, storey, alternatives, verdict, modelled } = battery;
  const [head, ...rows] = weighRows(alternatives, undefined);
  const chosen = alternatives.findIndex((one) => one.modelled);
  const mark = (at: number): Readonly<Record<string, string>> => (at === chosen ? { class: 'chosen' } : {});
  const cut = cavityDrawing(battery, englishWeigh);
  const name = `${id}: ${title}${storey === null ? '' : `, ${storey}`}`;
  return [
    tag('h3', name),
    tag('p', sentence(`Modelled ${ventedText(modelled)}: ${why}`)),
    html(
      'table',
      { class: 'compared' },
      tag(
        'thead',
        tag('tr', tag('td'), ...(head?.cells ?? []).map((cell, at) => html('th', { scope: 'col', ...mark(at) }, cell))),
      ),
      tag(
        'tbody',
        ...rows.map(({ label, cells }) =>
          tag('tr', html('th', { scope: 'row' }, label), ...cells.map((cell, at) => html('td', mark(at), cell))),
        ),
      ),
    ),
    tag('p', tag('b', verdict)),
    tag(
      'figure',
      drawing(
        svgText(cut.shapes, { x: 0, y: 0, width: cut.width, height: cut.height }, `Cut through the wall, ${name}`),
      ),
      html('figcaption', { class: 'quiet' }, 'Cut through the wall, looking down; pipes and fittings to one scale.'),
    ),
  ];
}

function readings({ result }: ReportSource, { id, fixtures, reading, why, broken, others }: ResultBattery): Html[] {
  const kinds = new Map(
    result.fixtures.map(({ globalId, kind }) => [globalId, plainWords(kind ?? 'unidentified fixture')]),
  );
  const told = [{ reading, broken }, ...others];
  return [
    tag('h3', `${id}: ${countedKinds(fixtures.map((fixture) => kinds.get(fixture) ?? 'fixture'))}`),
    tag('p', sentence(`Modelled ${ventedText(reading)}: ${why}`)),
    tag(
      'ul',
      ...told.map((one) =>
        tag(
          'li',
          one.broken.length === 0
            ? `As ${plainWords(one.reading)}: its conditions hold.`
            : sentence(`As ${plainWords(one.reading)}: it would break ${conditionsText(one.broken)}`),
        ),
      ),
    ),
  ];
}
