import { type Html, html, tag } from './html-element.ts';
import { htmlHead } from './html-head.ts';
import { hashSource } from './offline-html.ts';
import { batterySections } from './report-batteries.ts';
import { errorsSection, otherFindingsSection, planSection, undersizedSection } from './report-findings.ts';
import { hydraulicsSection } from './report-hydraulics.ts';
import { pipeSection, takeOffSection } from './report-schedules.ts';
import type { Section } from './report-section.ts';
import type { ReportSource } from './report-source.ts';
import { reportStyle } from './report-style.ts';
import { basisSection, summarySection, titleBlock } from './report-summary.ts';

/**
 * The report as one HTML file: it opens from disk, prints, holds no script and fetches nothing. The same model gives the
 * same bytes, so it bears no date.
 */
export function reportHtml(source: ReportSource): string {
  const { result } = source;
  const sections = [
    summarySection(source),
    undersizedSection(source),
    errorsSection(source),
    planSection(source),
    batterySections(source),
    otherFindingsSection(source),
    takeOffSection(source),
    pipeSection(source),
    hydraulicsSection(source),
    basisSection(source),
  ].filter((section): section is Section => section !== null);
  const files = (result.models ?? [result.model]).map(({ file }) => file).join(', ');
  const body = tag(
    'body',
    ...titleBlock(source),
    caution(result.caution),
    html(
      'nav',
      { 'aria-label': 'Contents' },
      tag('ol', ...sections.map(({ id, title }) => tag('li', html('a', { href: `#${id}` }, title)))),
    ),
    html('main', {}, ...sections.map(({ id, title, parts }) => html('section', { id }, tag('h2', title), ...parts))),
    tag('footer', caution(result.caution)),
  );
  const policy = `default-src 'none'; style-src ${hashSource(reportStyle)}; base-uri 'none'; form-action 'none'`;
  const title = tag('title', `${files} · sanitary drainage and vents`).markup;
  return `${htmlHead({ policy, title, style: reportStyle, darkAndLight: false })}
${body.markup}
</html>
`;
}

const caution = (text: string): Html => html('p', { class: 'caution', role: 'note' }, text);
