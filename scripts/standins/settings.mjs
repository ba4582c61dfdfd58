/** @param {string} name @returns {string} a setting the stand-in cannot run without */
export function required(name) {
  const value = process.env[name]
  if (!value) throw new Error(`${name} is not set: the stand-ins are started by npm start`)
  return value
}
