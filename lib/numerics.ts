// Numerics: fitting, sampling, summaries and roots; nothing of chemistry.
// The door of the topic; one subject a file stands in the folder beside it.
export * from "./numerics/distributions.js";
export * from "./numerics/linear.js";
export * from "./numerics/root.js";
export * from "./numerics/sampling.js";
export * from "./numerics/summary.js";
