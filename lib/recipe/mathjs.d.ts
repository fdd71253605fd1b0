// The part of mathjs's bundle this library calls; the package carries types for its modules only.
declare module "mathjs/lib/browser/math.js" {
  import type { MathJsInstance } from "mathjs";
  const mathjs: {
    /** An instance of its own, so that units made in it are nobody else's. */
    create(): Pick<MathJsInstance, "unit" | "createUnit">;
  };
  export default mathjs;
}
