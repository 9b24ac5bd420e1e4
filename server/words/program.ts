/** Name and version, as findings and sheets carry them; a test holds the version against package.json. */
export const program: { readonly name: string; readonly version: string } = {
  name: "thermal-window",
  version: "0.1.0",
};
