// Bundles the panel of a page, with the part of the library it computes with, into one script: dist/panel/panel.js.

export default {
  logLevel: "warn",
  build: {
    lib: {
      entry: "notebook/panel/page/panel.ts",
      formats: ["iife"],
      name: "resinwrightPanel",
      fileName: () => "panel.js",
    },
    outDir: "dist/panel",
    target: "es2022",
  },
};
