import type { Tools } from '../tools.ts';

export type System = 'I' | 'II' | 'III' | 'IV';
/** Systems whose branches go by flow; in III each appliance has its own row. */
export type FlowSystem = Exclude<System, 'III'>;

export const systemOf = ({ settings }: Pick<Tools, 'settings'>): System => settings.system as System;

/** The German rules beside the standard, which know system I only. */
export const isGerman = (tools: Pick<Tools, 'settings'>): boolean =>
  tools.settings.national === 'din' && systemOf(tools) === 'I';

/** Pipes in line with an appliance or several, up to the stack or the drain. */
export const isLine = (drain: string | null): boolean => drain === 'branch' || drain === 'fixture-drain';
