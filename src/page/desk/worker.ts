import type { DeskParts } from '../../deliver/desk-html.ts';
import { pageDataOf } from '../../deliver/page-data-of.ts';
import { quickPlan, shortPlan } from '../../deliver/quick-plan.ts';
import { InputError } from '../../findings/input-error.ts';
import { changedCheck } from './changed-check.ts';
import { checkBuilding, type DeskBuilding, type DeskCheck, openBuilding, readBuilding } from './check-building.ts';
import { deskCode } from './desk-code.ts';
import type { DeskAnswer, DeskAsk, Stage } from './messages.ts';
import { savedFile } from './saved-file.ts';

/** The worker: keeps the building and its last check, so that another code or a file to save needs no second reading. */
let parts: DeskParts | null = null;
let building: DeskBuilding | null = null;
let checked: DeskCheck | null = null;

const answer = (message: DeskAnswer): void => self.postMessage(message);
const stage = (name: Stage): void => answer({ say: 'stage', stage: name });

self.onmessage = ({ data }: MessageEvent<DeskAsk>) => {
  try {
    obey(data);
  } catch (error) {
    const fault = !(error instanceof InputError);
    const message = error instanceof Error ? error.message : String(error);
    answer({ say: 'refused', message: fault && error instanceof Error ? (error.stack ?? message) : message, fault });
  }
};

function obey(asked: DeskAsk): void {
  if (asked.ask === 'begin') {
    parts = asked.parts;
    return;
  }
  if (parts === null) throw new Error('asked before the beginning');
  // Wrong answers or tables are said before the long part.
  const own = asked.ask === 'check' || asked.ask === 'code' ? deskCode(asked.code, asked.own, parts) : null;
  if (asked.ask === 'check') {
    [building, checked] = [null, null];
    stage('unpacking');
    const files = openBuilding(asked.inputs);
    stage('reading');
    building = readBuilding(files);
  }
  if (building === null) throw new Error('asked before a building was read');
  if (asked.ask === 'save') {
    if (checked === null) throw new Error('asked to save before the check was done');
    answer({ say: 'file', ...savedFile(asked.what, building, checked, parts.version) });
    return;
  }
  if (asked.ask === 'what-if') {
    if (checked === null) throw new Error('asked what if before the check was done');
    const { outcome, result, sizes } = changedCheck(checked, asked.edits, parts.version);
    answer({ say: 'page', data: pageDataOf(outcome, result, sizes) });
    return;
  }
  if (asked.ask === 'mend') {
    if (checked === null) throw new Error('asked to mend before the check was done');
    const { outcome, result, sizes } = checked;
    answer({ say: 'page', data: pageDataOf(outcome, result, sizes, quickPlan(outcome) ?? shortPlan(outcome)) });
    return;
  }
  if (own === null) throw new Error(`asked ${asked.ask}`);
  stage('sizing');
  checked = checkBuilding(building, own, parts);
  stage('drawing');
  answer({ say: 'page', data: pageDataOf(checked.outcome, checked.result, checked.sizes) });
}
