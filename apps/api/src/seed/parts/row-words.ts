import type { CharacteristicInput, GeometricSpec, ToleranceSpec } from '@trammel/shared/characteristics';

type Row = CharacteristicInput;
type More = Partial<Omit<Row, 'balloon' | 'description' | 'tolerance'>>;

const row = (
  balloon: string,
  description: string,
  tolerance: ToleranceSpec,
  decimals: number,
  more: More,
): Row => ({
  balloon,
  sheet: '1',
  zone: '',
  description,
  kind: 'size',
  tolerance,
  geometric: null,
  unit: 'mm',
  decimals,
  class: 'none',
  method: '',
  attributeAllowed: false,
  pieces: null,
  controlledBy: [],
  note: '',
  ...more,
});

const placesOf = (text: string) => text.split('.')[1]?.length ?? 0;

/** Two limits as the drawing gives them. */
export const between = (
  balloon: string,
  description: string,
  lower: string,
  upper: string,
  more: More = {},
): Row =>
  row(
    balloon,
    description,
    { form: 'limits', lower, upper, nominal: null },
    Math.max(placesOf(lower), placesOf(upper)),
    more,
  );

/** A diameter with its fit class of ISO 286. */
export const fit = (
  balloon: string,
  description: string,
  nominal: string,
  fitClass: string,
  more: More = {},
): Row => row(balloon, description, { form: 'fit', nominal, fitClass }, 3, more);

export const atMost = (balloon: string, description: string, upper: string, more: More = {}): Row =>
  row(balloon, description, { form: 'max', upper, zeroBound: true }, placesOf(upper), more);

export const atLeast = (balloon: string, description: string, lower: string, more: More = {}): Row =>
  row(balloon, description, { form: 'min', lower }, placesOf(lower), more);

export const checked = (balloon: string, description: string, method: string, more: More = {}): Row =>
  row(balloon, description, { form: 'none', nominal: null }, 0, {
    kind: 'attribute',
    unit: '1',
    method,
    attributeAllowed: true,
    ...more,
  });

export const reference = (balloon: string, description: string, nominal: string, more: More = {}): Row =>
  row(balloon, description, { form: 'none', nominal }, placesOf(nominal), { kind: 'reference', ...more });

export const basic = (
  balloon: string,
  description: string,
  nominal: string,
  controlledBy: string[],
  more: More = {},
): Row =>
  row(balloon, description, { form: 'none', nominal }, placesOf(nominal), {
    kind: 'basic',
    controlledBy,
    ...more,
  });

const plain: GeometricSpec = {
  type: 'position',
  diametral: false,
  modifier: 'RFS',
  datums: '',
  feature: 'internal',
  sizeBalloon: null,
};

export const geometric = (
  balloon: string,
  description: string,
  upper: string,
  spec: Partial<GeometricSpec>,
  more: More = {},
): Row =>
  atMost(balloon, description, upper, { kind: 'geometric', geometric: { ...plain, ...spec }, ...more });
