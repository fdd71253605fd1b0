// The codes of hazard statements: one that exists nowhere finds nothing, and would pass for a clean bill.

/**
 * Numbers of the hazard statements of GHS and CLP.
 * @source GHS, annex 3, and Regulation (EC) No 1272/2008, annexes II and III. H200 to H420 compared with the list of the European
 * Commission's sampling manual (sampling-manual-customs-taxation.ec.europa.eu, hazard and precautionary phrases); H206 to H211,
 * H227, H229 to H232, H282 to H284 and the EUH statements from memory.
 */
const numbers: Readonly<Record<"H" | "EUH", string>> = {
  H:
    "200 201 202 203 204 205 206 207 208 209 210 211 220 221 222 223 224 225 226 227 228 229 230 231 232 240 241 242 250 251 252 " +
    "260 261 270 271 272 280 281 282 283 284 290 300 301 302 303 304 305 310 311 312 313 314 315 316 317 318 319 320 330 331 332 " +
    "333 334 335 336 340 341 350 351 360 361 362 370 371 372 373 400 401 402 410 411 412 413 420",
  EUH:
    "001 006 014 018 019 029 031 032 044 059 066 070 071 201 202 203 204 205 206 207 208 209 210 211 212 380 381 401 430 431 440 " +
    "441 450 451",
};

/** What may follow a number: the route, or which of fertility (F, f) and the unborn child (D, d), certain or suspected. */
const variants: Readonly<Record<string, readonly string[]>> = {
  H350: ["i"],
  H360: ["F", "D", "FD", "Fd", "Df"],
  H361: ["f", "d", "fd"],
  EUH201: ["A"],
  EUH209: ["A"],
};

const codes = Object.entries(numbers).flatMap(([prefix, list]) =>
  list.split(" ").flatMap((number) => {
    const code = prefix + number;
    return [code, ...(variants[code] ?? []).map((variant) => code + variant)];
  }),
);

/** Why a text is no hazard statement code, to follow the name of its field; undefined where it is one. */
export function hazardCodeProblem(given: string): string | undefined {
  if (codes.includes(given)) return undefined;
  const plain = (text: string) => text.replace(/[\s.-]/g, "").toLowerCase();
  const meant = codes.find((code) => plain(code) === plain(given));
  const advice =
    meant === undefined
      ? "such as H317, as the safety data sheet writes it, one code an entry"
      : `did you mean "${meant}"?`;
  return `is ${JSON.stringify(given)}; it must be the code of a hazard statement of GHS or CLP${meant === undefined ? "," : ";"} ${advice}`;
}

/**
 * Whether a statement is the one asked for, or a variant of it: `H360` finds `H360FD`, `H360D` finds `H360FD` and also the bare
 * `H360`, which leaves open which it is.
 */
export function isStatement(stated: string, asked: string): boolean {
  const [number, variant] = partsOf(stated);
  const [askedNumber, askedVariant] = partsOf(asked);
  if (number !== askedNumber) return false;
  return variant === "" || [...askedVariant].every((letter) => variant.includes(letter));
}

function partsOf(code: string): [number: string, variant: string] {
  const number = /^[A-Z]+\d+/.exec(code)?.[0] ?? code;
  return [number, code.slice(number.length)];
}
