export interface Face {
  readonly file: string;
  readonly package: string;
  readonly source: string;
  readonly family: string;
  readonly style: string;
}
export const FACES: readonly Face[];
