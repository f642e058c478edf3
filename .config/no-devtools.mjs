// Stands in for Ink's optional developer tools, which are never loaded here.
export default { initialize() {}, connectToDevTools() {} };
