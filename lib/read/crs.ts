/**
 * Coordinate reference systems by name, from the database that comes with GDAL; no network.
 *
 * @module
 */
import { crsOf } from "../layer/decode_layer.ts";
import { UsageError } from "../layer/errors.ts";
import { readFgbHeader } from "../layer/fgb_header.ts";
import type { Crs } from "../layer/layer.ts";
import { loadGdal } from "./gdal.ts";
import { GdalError, GdalFolder } from "./gdal_folder.ts";

/** A layer to hang the reference system on, since that writes it out in full. */
const ONE_POINT = `{"type":"Point","coordinates":[0,0]}`;

/**
 * Looks up a reference system.
 *
 * @param text `EPSG:25832` or another authority's code, a PROJ string, or WKT.
 * @throws UsageError where GDAL does not know it.
 * Cost: a few milliseconds once GDAL runs.
 */
export async function resolveCrs(text: string): Promise<Crs> {
  const wanted = text.trim();
  const crs = wanted === "" ? null : describeCrs(new GdalFolder(await loadGdal()), wanted);
  if (crs === null) {
    throw new UsageError(
      `No coordinate reference system "${text}" is known; give a code such as EPSG:4326, a PROJ string or WKT`,
    );
  }
  return crs;
}

function describeCrs(holder: GdalFolder, text: string): Crs | null {
  using folder = holder;
  folder.put("point.geojson", new TextEncoder().encode(ONE_POINT));
  try {
    const args = ["-f", "FlatGeobuf", "-lco", "SPATIAL_INDEX=NO", "-a_srs", text];
    folder.translate(folder.open("point.geojson"), "point.fgb", { args });
  } catch (cause) {
    if (cause instanceof GdalError) return null;
    throw cause;
  }
  const stored = readFgbHeader(folder.take("point.fgb")).header.crs;
  // A PROJ string names nothing: GDAL calls it unknown, the user called it this.
  const named = stored && /^unknown$/i.test(stored.name ?? "") ? { ...stored, name: text } : stored;
  return crsOf(named);
}
