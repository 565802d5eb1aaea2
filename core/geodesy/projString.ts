/** Parameters of a projection string: "+proj=utm +zone=33 +south" -> proj: "utm", zone: "33", south: "". */
export function projParameters(definition: string): Map<string, string> {
  const out = new Map<string, string>()
  for (const m of definition.matchAll(/\+([A-Za-z_0-9]+)(?:=(\S+))?/g)) out.set(m[1], m[2] ?? '')
  return out
}

/** The string without what rasters ignore: axis order, +type, +no_defs, vertical parts. */
export const tidyProjString = (definition: string): string =>
  definition
    .replace(/\+(axis|type|vunits|vto_meter|geoidgrids)=\S+|\+(no_defs|wktext)\b/g, '')
    .replace(/\s+/g, ' ')
    .trim()
