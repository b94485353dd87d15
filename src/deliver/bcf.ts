import { zipSync } from 'fflate';
import { boxAround } from '../geometry/box.ts';
import type { Box, Vec3 } from '../geometry/vector.ts';
import type { Model } from '../model/model.ts';
import { elementRows } from '../schedule/element-rows.ts';
import { type Issue, issuesOf } from '../schedule/issues.ts';
import type { Result } from '../schedule/result.ts';
import { viewpoint } from './bcf-viewpoint.ts';
import { nameUuid } from './name-uuid.ts';
import { type XmlElement, xml, xmlDocument } from './xml.ts';
import { firstZipDay } from './zip-day.ts';

/** A file of the building as other programs know it. */
export interface IssueFile {
  readonly name: string;
  /** GlobalId of its project; null where it has none. */
  readonly project: string | null;
  /** `2026-03-02T09:30:00Z`; null where its header does not say. */
  readonly written: string | null;
}

/**
 * The issues of a result as a BCF 2.1 archive: a topic for each, with a view of its elements. The same causes get the
 * same topics in the next revision, and the same input the same bytes: topics are as old as the model, whatever the day.
 */
export function bcf(result: Result, model: Model, files: readonly IssueFile[]): Uint8Array {
  const { issues, leftOut } = issuesOf(result);
  const rows = elementRows(result);
  const places = placesOf(model);
  const seen = new Map<string, number>();
  const entries: Record<string, Uint8Array> = { 'bcf.version': document(version) };
  issues.forEach((issue, at) => {
    const words = JSON.stringify([issue.code, [...issue.about].sort()]);
    const twins = seen.get(words) ?? 0;
    seen.set(words, twins + 1);
    const id = nameUuid(`Drainwright topic ${twins} ${words}`);
    const viewId = nameUuid(`Drainwright view ${twins} ${words}`);
    const named = new Set(issue.about.flatMap((about) => rows.get(about)?.file ?? []));
    const own = files.filter(({ name }) => files.length === 1 || named.size === 0 || named.has(name));
    const last = at === issues.length - 1 && leftOut > 0 ? [`${leftOut} more issues are not listed.`] : [];
    const ids = issue.about.map((about) => rows.get(about)?.globalId ?? about);
    const box = boxAround(ids.flatMap((globalId) => corners(places.get(globalId) ?? null)));
    entries[`${id}/`] = new Uint8Array();
    entries[`${id}/markup.bcf`] = document(markup(issue, { id, viewId, at, files: own, result, last }));
    entries[`${id}/viewpoint.bcfv`] = document(viewpoint(viewId, [...new Set(ids)], box));
  });
  return zipSync(entries, { mtime: firstZipDay });
}

interface Around {
  readonly id: string;
  readonly viewId: string;
  readonly at: number;
  readonly files: readonly IssueFile[];
  readonly result: Result;
  readonly last: readonly string[];
}

function markup(issue: Issue, { id, viewId, at, files, result, last }: Around): XmlElement {
  const { program, code, caution } = result;
  const date =
    files
      .flatMap(({ written }) => written ?? [])
      .sort()
      .at(-1) ?? noDate;
  const text = [issue.text, `${code.title} ${code.edition} (${code.id}).`, ...last, caution].join('\n');
  return xml('Markup', {}, [
    xml('Header', {}, files.map(headerFile)),
    xml('Topic', { Guid: id, TopicType: issue.severity === 'error' ? 'Error' : 'Warning', TopicStatus: 'Open' }, [
      xml('Title', {}, issue.title),
      xml('Index', {}, String(at + 1)),
      xml('Labels', {}, issue.code),
      xml('CreationDate', {}, date),
      xml('CreationAuthor', {}, `${program.name} ${program.version}`),
      xml('Description', {}, text),
    ]),
    xml('Viewpoints', { Guid: viewId }, [xml('Viewpoint', {}, 'viewpoint.bcfv')]),
  ]);
}

const headerFile = ({ name, project, written }: IssueFile): XmlElement =>
  xml('File', project !== null && wellFormed.test(project) ? { IfcProject: project } : {}, [
    xml('Filename', {}, name),
    written === null ? null : xml('Date', {}, written),
  ]);

const version = xml('Version', { VersionId: '2.1' }, [xml('DetailedVersion', {}, '2.1')]);
/** A topic must have a date; this one says that nobody knows. */
const noDate = '1970-01-01T00:00:00Z';
/** What the format takes for a GlobalId. */
const wellFormed = /^[0-9A-Za-z_$]{22}$/;

const document = (root: XmlElement): Uint8Array => new TextEncoder().encode(xmlDocument(root));

/** Where each element is, in world metres, by GlobalId; of a doubled one the first that has a place. */
function placesOf({ elements }: Model): ReadonlyMap<string, Box> {
  const places = new Map<string, Box>();
  for (const { globalId, centreLine, box, origin } of elements) {
    if (places.has(globalId)) continue;
    const own = box ?? boxAround(centreLine?.points ?? (origin === null ? [] : [origin]));
    if (own !== null) places.set(globalId, own);
  }
  return places;
}

const corners = (box: Box | null): readonly Vec3[] => (box === null ? [] : [box.min, box.max]);
