/** The names of CONTRACT. A code that uses other words may add roles of its own; the shared names keep their meaning. */
export type DrainRole = 'fixture-drain' | 'branch' | 'stack' | 'building-drain' | 'building-sewer';
export type WetVentRole =
  | 'wet-vent'
  | 'circuit-vented-branch'
  | 'common-vent'
  | 'waste-stack-vent'
  | 'combination-waste-and-vent'
  | 'single-stack';
export type VentRole =
  | 'individual-vent'
  | 'dual-vent'
  | 'continuous-vent'
  | 'branch-vent'
  | 'circuit-vent'
  | 'additional-circuit-vent'
  | 'relief-vent'
  | 'stack-vent'
  | 'vent-stack'
  | 'vent-header'
  | 'yoke-vent'
  | 'offset-relief-vent'
  | 'tank-vent'
  | 'island-vent';
export type Role = DrainRole | WetVentRole | VentRole | 'idle' | 'unknown';
export type Portion = 'wet' | 'dry' | 'outlet';
