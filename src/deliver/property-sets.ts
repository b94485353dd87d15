import {
  labelToWrite,
  type PropertySetToWrite,
  type PropertyToWrite,
  propertiesToWrite,
  textToWrite,
  type ValueToWrite,
} from '../model/property-set.ts';
import { answerTexts } from '../schedule/answers-text.ts';
import { demandText, governing, governingClauses } from '../schedule/demand-text.ts';
import { elementNames } from '../schedule/element-names.ts';
import { elementRows } from '../schedule/element-rows.ts';
import type { Result, ResultFixture, ResultPipe, SizeLabel, SizeRange } from '../schedule/result.ts';
import { plainWords } from '../schedule/trade-words.ts';
import { plainLabel } from '../tables/printed-value.ts';

/** The file that the sets are for: its name in the result, and how many metres its length unit is. */
export interface TargetFile {
  readonly file: string;
  readonly metresPerUnit: number;
}

/**
 * What is written into one file of the model: a set for each of its pipes and fixtures, in the order of the result,
 * and one for the building. Loads are the heaviest reading; lengths are in the file's unit. Nothing is written where
 * nothing is known.
 */
export function propertySets(result: Result, target: TargetFile): PropertySetToWrite[] {
  const rows = elementRows(result);
  const here = <T extends { readonly globalId: string }>(list: readonly T[]): T[] =>
    list.filter(({ globalId }) => rows.get(globalId)?.file === target.file);
  const names = elementNames(result);
  return [
    ...here(result.pipes).map((pipe) => ({
      name: 'Drainwright_Pipe',
      on: pipe.stepId,
      properties: pipeProperties(pipe, result, target.metresPerUnit, names.of),
    })),
    ...here(result.fixtures).map((fixture) => ({
      name: 'Drainwright_Fixture',
      on: fixture.stepId,
      properties: fixtureProperties(fixture, result.code.unit, target.metresPerUnit),
    })),
    { name: 'Drainwright_Model', on: 'building', properties: modelProperties(result, target.file) },
  ];
}

function pipeProperties(
  pipe: ResultPipe,
  { code }: Result,
  metresPerUnit: number,
  nameOf: (globalId: string) => string,
): PropertyToWrite[] {
  const { least, most } = pipe.required ?? { least: null, most: null };
  const because = governing(pipe).map((step) => demandText(step, code.unit, nameOf));
  const length = (metres: number | undefined): ValueToWrite | null => lengthIn(metres, metresPerUnit);
  return propertiesToWrite({
    Role: labelToWrite(pipe.role),
    AlsoRole: labelToWrite(pipe.also.join(', ')),
    Portion: labelToWrite(pipe.portion ?? ''),
    Load: real(pipe.load.most),
    LoadUnit: labelToWrite(code.unit),
    VentLoad: pipe.ventLoad === undefined ? null : real(pipe.ventLoad.most),
    DevelopedLength: length(pipe.developedLength),
    ModelledSize: sizeLabel(pipe.modelled),
    RequiredSize: sizeLabel(most),
    RequiredSizeLeast: differ(pipe.required) ? sizeLabel(least) : null,
    RequiredNominalDiameter: most === null ? null : nominalDiameter(most, metresPerUnit),
    Verdict: labelToWrite(pipe.verdict),
    GoverningClause: labelToWrite(governingClauses(pipe).join('; ')),
    Because: textToWrite([...(pipe.reason === undefined ? [] : [pipe.reason]), ...because].join('. ')),
    Code: labelToWrite(code.id),
    Edition: labelToWrite(code.edition),
  });
}

function fixtureProperties(fixture: ResultFixture, unit: string, metresPerUnit: number): PropertyToWrite[] {
  const { kind, load, trapSize, ventedBy, trapArm } = fixture;
  return propertiesToWrite({
    Kind: labelToWrite(plainWords(kind ?? 'unidentified')),
    Load: real(load.most),
    LoadUnit: labelToWrite(unit),
    TrapSize: sizeLabel(trapSize),
    VentedBy: labelToWrite(ventedBy.how),
    TrapArmLength: lengthIn(trapArm?.length, metresPerUnit),
    TrapArmLimit: lengthIn(trapArm?.limit, metresPerUnit),
  });
}

const mostAnswers = 100;

function modelProperties(result: Result, file: string): PropertyToWrite[] {
  const { program, code, model, models, findings, pipes, caution } = result;
  const sha256 = (models ?? [model]).find((one) => one.file === file)?.sha256 ?? model.sha256;
  const said = answerTexts(result);
  const answers = [
    ...said.slice(0, mostAnswers),
    ...(said.length > mostAnswers ? [`and ${said.length - mostAnswers} more`] : []),
  ];
  const count = (severity: string): number => findings.filter((finding) => finding.severity === severity).length;
  return propertiesToWrite({
    Program: labelToWrite(program.name),
    Version: labelToWrite(program.version),
    Code: labelToWrite(code.id),
    Edition: labelToWrite(code.edition),
    InputSha256: labelToWrite(sha256),
    InputFiles: textToWrite((models ?? []).map((one) => `${one.file} ${one.sha256}`).join('; ')),
    Answers: textToWrite(answers.join('; ')),
    Errors: integer(count('error')),
    Warnings: integer(count('warning')),
    Undersized: integer(pipes.filter(({ verdict }) => verdict === 'undersized').length),
    Caution: textToWrite(caution),
  });
}

const real = (value: number): ValueToWrite => ({ as: 'real', value });
const integer = (value: number): ValueToWrite => ({ as: 'integer', value });
const sizeLabel = (size: SizeLabel | null): ValueToWrite | null => (size === null ? null : labelToWrite(size.label));
const differ = (range: SizeRange | null): boolean => range !== null && range.least?.label !== range.most?.label;

function lengthIn(metres: number | null | undefined, metresPerUnit: number): ValueToWrite | null {
  return metres === null || metres === undefined ? null : { as: 'length', value: rounded(metres / metresPerUnit) };
}

/** Whole inches in a file that counts in inches or feet, the DN elsewhere: each reads back as the size it stands for. */
function nominalDiameter({ label: name, dn }: SizeLabel, metresPerUnit: number): ValueToWrite {
  const inches = inchesOf(name);
  const isImperial = Math.abs(metresPerUnit / inch - Math.round(metresPerUnit / inch)) < surveyFoot;
  const metres = isImperial && inches !== null ? inches * inch : dn / 1000;
  return { as: 'positive-length', value: rounded(metres / metresPerUnit) };
}

const inch = 0.0254;
/** The survey foot is two millionths longer than twelve inches. */
const surveyFoot = 1e-4;

/** 1.5 of `1½ in`; null for a label in another unit. */
function inchesOf(name: string): number | null {
  const read = /^(?:(\d+) ?)?(?:(\d+)\/(\d+) )?in$/.exec(plainLabel(name).replace(/(\d) in$/, '$1 in'));
  if (read === null) return null;
  const [, whole = '0', above = '0', below = '1'] = read;
  const inches = Number(whole) + Number(above) / Number(below);
  return inches > 0 ? inches : null;
}

/** Free of the last digits that a division leaves: a file says 101.6, not 101.60000000000001. */
const rounded = (value: number): number => Number(value.toPrecision(12));
