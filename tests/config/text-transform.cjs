/** Text files as modules, as the bundler takes them. */
module.exports = { process: (text) => ({ code: `module.exports = ${JSON.stringify(text)};` }) };
