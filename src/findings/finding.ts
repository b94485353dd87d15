export type Severity = 'error' | 'warning' | 'note';

export type FindingCode =
  | 'undersized'
  | 'oversized'
  | 'size-unknown'
  | 'smaller-downstream'
  | 'unvented-trap'
  | 'wet-vent-overloaded'
  | 'wet-vent-not-allowed'
  | 'circuit-vent-not-allowed'
  | 'relief-vent-missing'
  | 'additional-circuit-vent-missing'
  | 'one-vent-short'
  | 'stack-vent-missing'
  | 'vent-stack-missing'
  | 'vent-stack-misplaced'
  | 'yoke-vent-missing'
  | 'yoke-vent-misplaced'
  | 'offset-relief-vent-missing'
  | 'frost-enlargement-missing'
  | 'trap-arm-too-long'
  | 'trap-arm-too-steep'
  | 'outlet-pipe-too-long'
  | 'slope-too-small'
  | 'slope-unknown'
  | 'backfall'
  | 'vent-joins-too-low'
  | 'dry-vent-too-flat'
  | 'no-open-air'
  | 'terminal-too-low'
  | 'fresh-air-inlet-missing'
  | 'standpipe-too-short'
  | 'cleanout-missing'
  | 'cleanout-too-small'
  | 'closet-needs-larger'
  | 'branch-too-long'
  | 'appliance-not-allowed'
  | 'vent-area-too-small'
  | 'main-vent-missing'
  | 'common-vent-not-allowed'
  | 'waste-stack-vent-not-allowed'
  | 'combination-not-allowed'
  | 'single-stack-not-allowed'
  | 'island-vent-not-allowed'
  | 'valve-not-allowed'
  | 'valve-needs-approval'
  | 'branch-near-foot'
  | 'suds-zone'
  | 'fixture-unidentified'
  | 'use-unknown'
  | 'sewer-too-large'
  | 'fixture-unconnected'
  | 'open-end'
  | 'dead-end'
  | 'joint-inferred'
  | 'joint-contradicted'
  | 'loop'
  | 'no-sewer-end'
  | 'sewer-end-assumed'
  | 'open-air-assumed'
  | 'storeys-assumed'
  | 'wrong-system'
  | 'fit-in-wall'
  | 'double-water-path'
  | 'doubled-element'
  | 'size-contradicted'
  | 'size-from-name'
  | 'kind-contradicted'
  | 'group-not-applied'
  | 'files-apart'
  | 'file-damaged'
  | 'text-damaged';

/** A value behind a sentence. The unit is in the fact's name: `loadUnits`, `lengthM`, `slope`, `size`. */
export type Fact = string | number | boolean | null | readonly string[];
export type Facts = Readonly<Record<string, Fact>>;

/**
 * What a stage has to say about the model. `about` holds dense element ids, the thing at fault first;
 * GlobalIds and the sentence are made at the edge, from `facts`.
 */
export interface Finding {
  readonly code: FindingCode;
  readonly severity: Severity;
  readonly about: readonly number[];
  readonly facts: Facts;
  /** Clause of the code in force, where one is broken. */
  readonly clause?: string;
}

export interface WithFindings<T> {
  readonly value: T;
  readonly findings: readonly Finding[];
}

/** Every code has one severity. A code that CONTRACT does not list states its severity here. */
export const severityOf: Readonly<Record<FindingCode, Severity>> = {
  oversized: 'note',
  'one-vent-short': 'note',
  'dead-end': 'note',
  'joint-inferred': 'note',
  'frost-enlargement-missing': 'note',
  'sewer-end-assumed': 'note',
  'open-air-assumed': 'note',
  'storeys-assumed': 'note',
  'group-not-applied': 'note',
  'size-from-name': 'note',
  'doubled-element': 'warning',
  'size-contradicted': 'warning',
  'kind-contradicted': 'warning',
  'joint-contradicted': 'warning',
  'file-damaged': 'warning',
  'text-damaged': 'note',
  'size-unknown': 'warning',
  'slope-unknown': 'warning',
  'fixture-unidentified': 'warning',
  'use-unknown': 'warning',
  'sewer-too-large': 'warning',
  'open-end': 'warning',
  loop: 'warning',
  'wrong-system': 'warning',
  'double-water-path': 'warning',
  'dry-vent-too-flat': 'warning',
  'terminal-too-low': 'warning',
  'fresh-air-inlet-missing': 'warning',
  'standpipe-too-short': 'warning',
  'cleanout-missing': 'warning',
  'cleanout-too-small': 'warning',
  'fit-in-wall': 'warning',
  undersized: 'error',
  'smaller-downstream': 'error',
  'unvented-trap': 'error',
  'wet-vent-overloaded': 'error',
  'wet-vent-not-allowed': 'error',
  'circuit-vent-not-allowed': 'error',
  'relief-vent-missing': 'error',
  'additional-circuit-vent-missing': 'error',
  'stack-vent-missing': 'error',
  'vent-stack-missing': 'error',
  'vent-stack-misplaced': 'error',
  'yoke-vent-missing': 'error',
  'yoke-vent-misplaced': 'error',
  'offset-relief-vent-missing': 'error',
  'trap-arm-too-long': 'error',
  'trap-arm-too-steep': 'error',
  'outlet-pipe-too-long': 'error',
  'slope-too-small': 'error',
  backfall: 'error',
  'vent-joins-too-low': 'error',
  'no-open-air': 'error',
  'closet-needs-larger': 'error',
  'branch-too-long': 'error',
  'appliance-not-allowed': 'error',
  'vent-area-too-small': 'error',
  'main-vent-missing': 'error',
  'common-vent-not-allowed': 'error',
  'waste-stack-vent-not-allowed': 'error',
  'combination-not-allowed': 'error',
  'single-stack-not-allowed': 'error',
  'island-vent-not-allowed': 'error',
  'valve-not-allowed': 'error',
  'valve-needs-approval': 'warning',
  'branch-near-foot': 'error',
  'suds-zone': 'warning',
  'fixture-unconnected': 'error',
  'no-sewer-end': 'error',
  'files-apart': 'error',
};

export function finding(code: FindingCode, about: readonly number[], facts: Facts, clause?: string): Finding {
  return { code, severity: severityOf[code], about, facts, ...(clause === undefined ? {} : { clause }) };
}
