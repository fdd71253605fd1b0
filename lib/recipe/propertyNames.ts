// The properties of a formulation under a brief, apart from how a brief is read: what computes in a page needs the one
// without the other.

import type { PropertyName } from "./brief.js";

/** Every property that is assessed, in the order tables show them. */
export const propertyNames: readonly PropertyName[] = [
  "viscosity_mPas",
  "opticalDepth_um",
  "penetrationDepth_um",
  "criticalExposure_mJcm2",
  "layerExposure_mJcm2",
  "layerTime_s",
  "deadZone_um",
  "inductionTime_s",
];
