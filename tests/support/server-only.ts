// Stands in for the package of this name, which refuses to load outside a server build.
export {};
