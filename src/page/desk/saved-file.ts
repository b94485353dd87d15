import { zipSync } from 'fflate';
import { bcf } from '../../deliver/bcf.ts';
import { propertySets } from '../../deliver/property-sets.ts';
import { quickPlan } from '../../deliver/quick-plan.ts';
import { reportHtml } from '../../deliver/report-html.ts';
import { reportSource } from '../../deliver/report-source.ts';
import { sha256 } from '../../deliver/sha256.ts';
import { firstZipDay } from '../../deliver/zip-day.ts';
import { fileOrigin } from '../../ifc/file-origin.ts';
import type { OpenedFile } from '../../ifc/open.ts';
import { appendSets } from '../../ifc/write/append-sets.ts';
import { answersFormText } from '../../schedule/answers-form.ts';
import { jsonText } from '../../schedule/json-text.ts';
import { questionsOf } from '../../schedule/questions.ts';
import { takeOffCsv } from '../../schedule/take-off.ts';
import { joined } from '../joined.ts';
import type { DeskBuilding, DeskCheck } from './check-building.ts';
import type { SaveKind } from './messages.ts';

export interface SavedFile {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** What the command line would write of this check. Of several models the sized copies come in one archive. */
export function savedFile(what: SaveKind, building: DeskBuilding, check: DeskCheck, version: string): SavedFile {
  const base = stem(building.files[0]!.name);
  switch (what) {
    case 'json':
      return { name: `${base}.json`, bytes: encoder.encode([...jsonText({ ...check.result })].join('')) };
    case 'csv':
      return { name: `${base}.csv`, bytes: encoder.encode(takeOffCsv(check.outcome)) };
    case 'html': {
      const { outcome, result } = check;
      return {
        name: `${base}-report.html`,
        bytes: encoder.encode(reportHtml(reportSource(outcome, result, quickPlan(outcome)))),
      };
    }
    case 'answers':
      return { name: `${base}-answers.json`, bytes: encoder.encode(answersFormText(questionsOf(check.result))) };
    case 'bcf':
      return { name: `${base}.bcf`, bytes: bcf(check.result, building.model, building.files.map(fileOrigin)) };
    case 'ifc': {
      const copies = owners(building, check).map((file) => ({
        name: `${stem(file.name)}-sized.ifc`,
        bytes: sizedCopy(file, building, check, version),
      }));
      const [only] = copies;
      if (only !== undefined && copies.length === 1) return only;
      const entries = Object.fromEntries(copies.map(({ name, bytes }) => [name, bytes]));
      return { name: `${base}-sized.zip`, bytes: zipSync(entries, { mtime: firstZipDay }) };
    }
  }
}

function sizedCopy(file: OpenedFile, { files, model }: DeskBuilding, { result }: DeskCheck, version: string) {
  const { name, lengthUnit } = model.files[files.indexOf(file)]!;
  const sets = propertySets(result, { file: name, metresPerUnit: lengthUnit.metres });
  return joined(appendSets(file.index, sets, { name: file.name, digest: sha256, version }));
}

/** Files that own something of the drainage; all of them where none does. */
function owners({ files }: DeskBuilding, { result }: DeskCheck): readonly OpenedFile[] {
  const used = new Set(
    result.elements.filter(({ use }) => use !== 'left-out' && use !== 'unresolved').map(({ file }) => file),
  );
  const found = files.filter(({ name }) => files.length === 1 || used.has(name));
  return found.length === 0 ? files : found;
}

const stem = (name: string): string => name.replace(/\.ifc$/i, '');
const encoder = new TextEncoder();
