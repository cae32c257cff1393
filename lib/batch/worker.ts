/**
 * The worker of a batch: the row solver behind messages, with neither algebra nor packages loaded.
 *
 * @module
 */
import { computeRow } from "../observe/row.ts";
import { serve } from "./serve.ts";

serve(computeRow);
