// What a weigh-out sheet says, as plain text: a cell hands it over, the renderer sets it on paper.

import { z } from "zod";

/** A portion as the sheet shows it: masses as the balance shows them, in g. */
export interface SheetPortion {
  readonly line: number;
  readonly portion: string;
  /** CAS number, or what else tells the bottle apart; may be empty. */
  readonly identity: string;
  readonly reason: string;
  /** What to look out for at this step. */
  readonly notes: readonly string[];
  readonly target: string;
  readonly limits: string;
  readonly total: string;
  readonly lot: string;
}

/** A master batch to make before: what to weigh, and how it is dosed. */
export interface SheetMasterBatch {
  readonly title: string;
  readonly weighings: readonly { readonly what: string; readonly target: string }[];
  readonly notes: readonly string[];
}

/** A weigh-out sheet as data. */
export interface SheetContent {
  readonly kind: "sheet";
  /** What the names of its files begin with. */
  readonly name: string;
  readonly title: string;
  /** Which batch a loose page belongs to, in a few words. */
  readonly label: string;
  readonly facts: readonly { readonly name: string; readonly text: string }[];
  readonly warnings: readonly string[];
  readonly protection: readonly string[];
  readonly masterBatches: readonly SheetMasterBatch[];
  readonly portions: readonly SheetPortion[];
  readonly hazards: readonly {
    readonly ingredient: string;
    readonly name: string;
    readonly cas: string;
    readonly statements: string;
  }[];
  readonly findings: readonly string[];
  readonly storage: readonly string[];
  readonly law: readonly string[];
  readonly caution: string;
}

const texts = z.array(z.string());

export const sheetSchema: z.ZodType<SheetContent> = z.strictObject({
  kind: z.literal("sheet"),
  // Part of a file name: nothing that leads out of the folder.
  name: z.string().regex(/^[a-z0-9][a-z0-9-]*$/, { error: "must be small letters, digits and hyphens" }),
  title: z.string(),
  label: z.string(),
  facts: z.array(z.strictObject({ name: z.string(), text: z.string() })),
  warnings: texts,
  protection: texts,
  masterBatches: z.array(
    z.strictObject({
      title: z.string(),
      weighings: z.array(z.strictObject({ what: z.string(), target: z.string() })),
      notes: texts,
    }),
  ),
  portions: z.array(
    z.strictObject({
      line: z.number(),
      portion: z.string(),
      identity: z.string(),
      reason: z.string(),
      notes: texts,
      target: z.string(),
      limits: z.string(),
      total: z.string(),
      lot: z.string(),
    }),
  ),
  hazards: z.array(
    z.strictObject({ ingredient: z.string(), name: z.string(), cas: z.string(), statements: z.string() }),
  ),
  findings: texts,
  storage: texts,
  law: texts,
  caution: z.string(),
});
