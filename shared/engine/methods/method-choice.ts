/** Names of registry entries, one for each kind of method; what is left out takes the default of its kind. */
export interface MethodChoice {
  readonly strouhal: string;
  readonly windPower: string;
  readonly turbulence: string;
  readonly selfDamping: string;
  readonly life: string;
}

/** A choice of some methods. */
export type PartialMethodChoice = { readonly [Kind in keyof MethodChoice]?: MethodChoice[Kind] | undefined };
