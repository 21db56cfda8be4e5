/** A stop that a person can mend: printed as it stands, without a stack. */
export class Refusal extends Error {}
