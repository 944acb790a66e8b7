// What the decoders find in place of Node's modules, which they ask for only outside a browser.
export {};
