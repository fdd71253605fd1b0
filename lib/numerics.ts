// Numerics: fitting, sampling, summaries, tests and roots; nothing of chemistry.
// The door of the topic; one subject a file stands in the folder beside it.
export * from "./numerics/deletedResiduals.js";
export * from "./numerics/distributions.js";
export * from "./numerics/levenbergMarquardt.js";
export * from "./numerics/linear.js";
export * from "./numerics/root.js";
export * from "./numerics/runs.js";
export * from "./numerics/sampling.js";
export * from "./numerics/summary.js";
export * from "./numerics/varianceRatio.js";
