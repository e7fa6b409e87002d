/** One fault as the compiled schema reports it. */
export interface SchemaFault {
  keyword: string;
  instancePath: string;
  params: Record<string, unknown>;
  propertyName?: string;
}

/** True where the value fits; else `errors` holds the faults until the next call. */
export interface Validator {
  (value: unknown): boolean;
  errors?: SchemaFault[] | null;
}

type ValidatorName = 'datasetShell' | 'datasetItem' | 'circuitsShell' | 'circuitsItem' | 'runSheetShell' | 'runSheetItem' | 'sealShell' | 'gateClassShell' | 'resultShell';

/** Validators that stop at the first fault. */
export const first: Readonly<Record<ValidatorName, Validator>>;
/** Validators that gather every fault; only for values of bounded size. */
export const all: Readonly<Record<ValidatorName, Validator>>;
