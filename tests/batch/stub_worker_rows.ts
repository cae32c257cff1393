/** Values of `tolerance` at which a row of the stub worker misbehaves. */
export const HANG = 0.25, CRASH = 0.26, EXHAUST = 0.27, NOT_A_NUMBER = 0.28, THROW = 0.29;
/** Rows of the stub worker with this `kappa` take a quarter of a second. */
export const SLOW = 99;
