export interface Riser {
  readonly title: string;
}
