/**
 * The code points for which a TrueType or OpenType font has a glyph, read from its character map
 * (formats 4 and 12, the ones that Unicode fonts use).
 *
 * @see OpenType specification, "cmap - Character to Glyph Index Mapping Table"
 * @throws RangeError where the font has no Unicode character map of these formats
 */
export function coverageOf(font: Buffer): ReadonlySet<number> {
  const map = tableOf(font, "cmap");
  const covered = new Set<number>();
  let read = false;
  for (let index = 0; index < map.readUInt16BE(2); index++) {
    const platform = map.readUInt16BE(4 + 8 * index);
    if (platform !== 0 && platform !== 3) continue;
    const subtable = map.subarray(map.readUInt32BE(8 + 8 * index));
    const format = subtable.readUInt16BE(0);
    if (format === 4) addSegments(subtable, covered);
    if (format === 12) addGroups(subtable, covered);
    read ||= format === 4 || format === 12;
  }
  if (!read) throw new RangeError("the font has no Unicode character map of format 4 or 12");
  return covered;
}

function tableOf(font: Buffer, tag: string): Buffer {
  for (let index = 0; index < font.readUInt16BE(4); index++) {
    const entry = 12 + 16 * index;
    if (font.toString("latin1", entry, entry + 4) !== tag) continue;
    const start = font.readUInt32BE(entry + 8);
    return font.subarray(start, start + font.readUInt32BE(entry + 12));
  }
  throw new RangeError(`the font has no table ${tag}`);
}

/** Format 4: segments with a delta or an offset into an array of glyphs; glyph 0 means none. */
function addSegments(map: Buffer, covered: Set<number>): void {
  const double = map.readUInt16BE(6);
  const ends = 14;
  const starts = ends + double + 2;
  const deltas = starts + double;
  const offsets = deltas + double;
  for (let segment = 0; segment < double; segment += 2) {
    const start = map.readUInt16BE(starts + segment);
    const end = map.readUInt16BE(ends + segment);
    const delta = map.readUInt16BE(deltas + segment);
    const offset = map.readUInt16BE(offsets + segment);
    for (let code = start; code <= end && code < 0xffff; code++) {
      const listed = offset === 0 ? code : map.readUInt16BE(offsets + segment + offset + 2 * (code - start));
      const none = offset !== 0 && listed === 0;
      if (!none && ((listed + delta) & 0xffff) !== 0) covered.add(code);
    }
  }
}

/** Format 12: groups of code points with consecutive glyphs. */
function addGroups(map: Buffer, covered: Set<number>): void {
  for (let group = 0; group < map.readUInt32BE(12); group++) {
    const entry = 16 + 12 * group;
    const start = map.readUInt32BE(entry);
    const glyph = map.readUInt32BE(entry + 8);
    for (let code = start; code <= map.readUInt32BE(entry + 4); code++) {
      if (glyph + code - start !== 0) covered.add(code);
    }
  }
}
