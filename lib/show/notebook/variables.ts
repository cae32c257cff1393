/**
 * Variables of a kernel's environment through which a notebook gets its parameters.
 *
 * @module
 */

/** Names the run that a notebook reads: absolute path of its folder. */
export const RUN_VARIABLE = "BACKSTAMP_RUN";
/** Names the folder of displays above the limit: absolute path. */
export const DISPLAYS_VARIABLE = "BACKSTAMP_DISPLAYS";
