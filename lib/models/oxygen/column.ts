// The column of resin above the window, cut into cells: how much oxygen each holds, how easily it passes from one to the next,
// and how much light each gets. A film that stores oxygen is the lowest part of the column. Oxygen is counted as the
// concentration the resin would have in equilibrium, so that it is continuous where film and resin meet.
import { gradedFaces, type Focus } from "../../numerics/grid.js";
import { cm_per_m, m_per_um } from "../scales.js";

/** What lies between the gas and the resin. */
export type OxygenWindow =
  | {
      /** A film that resists but holds hardly any oxygen itself. */
      readonly film: "resists";
      /** Resin thickness that resists as the film does, l = D/kappa, at least 0, um; 0 for none. */
      readonly filmEquivalentThickness_um: number;
    }
  | {
      /** A plate that lets no oxygen through and holds none, such as glass. */
      readonly film: "tight";
    }
  | {
      /** A film whose own oxygen counts: a thick or very soluble one, or one on glass. */
      readonly film: "stores";
      /** Above 0, um. */
      readonly filmThickness_um: number;
      /** D of oxygen in the film, above 0, m2/s. */
      readonly filmDiffusivity_m2s: number;
      /** K: oxygen in the film over oxygen in the resin at equilibrium, above 0. */
      readonly filmPartition: number;
      /** True when the far side of the film lies on glass and gets no oxygen. */
      readonly sealed: boolean;
    };

/** The column in SI units; cells are counted from the gas up, film first. */
export interface Column {
  readonly cells: number;
  readonly filmCells: number;
  /** Faces of the resin cells, from 0 at the window up, m. */
  readonly faces_m: Float64Array;
  /** Centres of the resin cells, m. */
  readonly depths_m: Float64Array;
  /** Per cell: oxygen held per unit of concentration, m. */
  readonly capacity: Float64Array;
  /** Per cell: thickness in which the reaction runs, m; 0 in the film. */
  readonly reacting: Float64Array;
  /** Per cell: resistance from its centre to its face, s/m, at the start. */
  readonly halfResistance: Float64Array;
  /** Resistance between the gas and the lowest face, s/m; Infinity when nothing passes. */
  readonly gasResistance: number;
  /** Per cell: light averaged over the cell, over that at the window; 0 in the film, where it starts nothing. */
  readonly relativeLight: Float64Array;
  readonly gapThickness_um: number;
}

/** What the column is cut from. */
export interface ColumnInput {
  readonly gapThickness_um: number;
  readonly diffusivity_m2s: number;
  readonly napierianAbsorption_percm: number;
  readonly window: OxygenWindow;
  readonly grid: "graded" | "even";
  readonly cells: number;
  /** Depths in um where a front is expected to stand; cells are narrow there. */
  readonly edges_um: readonly number[];
}

/** Cuts the column. The film, if it stores oxygen, gets a quarter as many cells as the resin. */
export function columnOf(input: ColumnInput): Column {
  const { diffusivity_m2s: D, window } = input;
  const faces_m = gradedFaces({
    length: m_per_um * input.gapThickness_um,
    cells: input.cells,
    focuses: input.grid === "even" ? [] : focusesOf(input),
  });
  const film = window.film === "stores" ? filmWidths(window.filmThickness_um, input.cells) : [];
  const filmPart = window.film === "stores" ? window : { filmDiffusivity_m2s: 1, filmPartition: 1 };
  const K = filmPart.filmPartition;
  const widths = widthsOf(faces_m);
  return {
    cells: film.length + widths.length,
    filmCells: film.length,
    faces_m,
    depths_m: Float64Array.from(widths, (width, i) => faces_m[i]! + width / 2),
    capacity: Float64Array.of(...film.map((width) => K * width), ...widths),
    reacting: Float64Array.of(...film.map(() => 0), ...widths),
    halfResistance: Float64Array.of(
      ...film.map((width) => width / (2 * K * filmPart.filmDiffusivity_m2s)),
      ...widths.map((width) => width / (2 * D)),
    ),
    gasResistance: gasResistanceOf(window, D),
    relativeLight: Float64Array.of(
      ...film.map(() => 0),
      ...lightIn(faces_m, cm_per_m * input.napierianAbsorption_percm),
    ),
    gapThickness_um: input.gapThickness_um,
  };
}

/** Oxygen at the bottom of the resin, mol/m3, and its flux into the resin, mol/(m2 s). */
export interface AtWindow {
  readonly wallOxygen_molm3: number;
  readonly flux_molm2s: number;
}

/** Reads the window; `gasResistance` is Infinity while the supply is cut, `share` scales D of the lowest resin cell. */
export function atWindow(
  { filmCells, halfResistance, depths_m }: Column,
  oxygen: Float64Array,
  { saturation, gasResistance, share }: Readonly<Record<"saturation" | "gasResistance" | "share", number>>,
): AtWindow {
  const half = halfResistance[filmCells]! / share;
  const [lowest, next] = [oxygen[filmCells]!, oxygen[filmCells + 1]!];
  const below = filmCells === 0 ? gasResistance : halfResistance[filmCells - 1]!;
  if (below === Infinity)
    return { wallOxygen_molm3: atClosedEnd(lowest, next, depths_m[0]!, depths_m[1]!), flux_molm2s: 0 };
  const source = filmCells === 0 ? saturation : oxygen[filmCells - 1]!;
  const flux_molm2s = (source - lowest) / (below + half);
  return { wallOxygen_molm3: Math.max(lowest + flux_molm2s * half, 0), flux_molm2s };
}

/** Oxygen at an end that nothing passes: the parabola without slope there through the values at two distances from it. */
export function atClosedEnd(near: number, far: number, toNear: number, toFar: number): number {
  return Math.max(near - ((far - near) * toNear ** 2) / (toFar ** 2 - toNear ** 2), 0);
}

function gasResistanceOf(window: OxygenWindow, D: number): number {
  if (window.film === "tight") return Infinity;
  if (window.film === "resists") return (m_per_um * window.filmEquivalentThickness_um) / D;
  return window.sealed ? Infinity : 0;
}

/** Narrow cells at each expected edge and at the window; light that dies out near the window needs them narrower still. */
function focusesOf(input: ColumnInput): Focus[] {
  const length = m_per_um * input.gapThickness_um;
  const edges = input.edges_um.map((edge) => m_per_um * edge).filter((edge) => edge > 0 && edge < length);
  const lightDepth = 1 / (cm_per_m * input.napierianAbsorption_percm);
  const nearest = Math.min(length, lightDepth, ...edges);
  return [
    { at: 0, width: nearest / 4, share: 0.2 },
    ...edges.map((at) => ({ at, width: at / 10, share: 0.4 / edges.length })),
  ];
}

/** The film's cells, narrow towards the resin, m; listed from the gas up. */
function filmWidths(thickness_um: number, resinCells: number): number[] {
  const length = m_per_um * thickness_um;
  const cells = Math.max(4, Math.round(resinCells / 4));
  const faces = gradedFaces({ length, cells, focuses: [{ at: length, width: length / 10, share: 0.5 }] });
  return widthsOf(faces);
}

const widthsOf = (faces: Float64Array): number[] =>
  Array.from(faces.subarray(1), (face, i) => face - faces[i]!);

/** exp(-alpha z) averaged over each cell, so that every photon is counted however wide the cell. */
function lightIn(faces: Float64Array, alpha: number): number[] {
  return Array.from(faces.subarray(1), (upper, i) => {
    const opticalThickness = alpha * (upper - faces[i]!);
    const mean = opticalThickness === 0 ? 1 : -Math.expm1(-opticalThickness) / opticalThickness;
    return Math.exp(-alpha * faces[i]!) * mean;
  });
}
