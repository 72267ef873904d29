/**
 * A small invented layer with everything that goes wrong between formats: text beyond ASCII in names and values,
 * every field type, nulls, a hole, several parts, a row without geometry.
 *
 * @module
 */
import { join } from "node:path";
import { DatabaseSync } from "node:sqlite";
import { nativeGdal } from "./native_gdal.ts";

/** Values by row, in the order of the file. */
export const INVENTED_NAMES = ["Ærø Süd", "Łódź-ähnlich", "Ünterort", null, "Plain"] as const;
/** The field `é`. */
export const INVENTED_NUMBERS = [1.5, -2.25, null, 0, 1e-7] as const;
/** The field `中文`. */
export const INVENTED_WORDS = ["值一", "值二", null, "", "值五"] as const;
/** Vertices of each row: a square with a square hole, a square and a triangle, none, a square, a triangle. */
export const INVENTED_VERTICES = [10, 9, 0, 5, 4] as const;
/** Coordinate system of the layer. */
export const INVENTED_CRS = "EPSG:32632";

const ROWS = `WKT,name,é,中文,count,big,day,moment,flag,single
"POLYGON ((500000 6000000,501000 6000000,501000 6001000,500000 6001000,500000 6000000),(500200 6000200,500200 6000400,500400 6000400,500400 6000200,500200 6000200))",Ærø Süd,1.5,值一,7,9007199254740993,2024/02/29,2024/02/29 13:45:10,1,0.1
"MULTIPOLYGON (((501000 6000000,502000 6000000,502000 6001000,501000 6001000,501000 6000000)),((503000 6000000,503500 6000000,503500 6000500,503000 6000000)))",Łódź-ähnlich,-2.25,值二,-3,-1,1999/12/31,,0,
,Ünterort,,,,,,,,-2.5
"POLYGON ((502000 6000000,503000 6000000,503000 6001000,502000 6001000,502000 6000000))",,0,"",0,0,1970/01/01,1970/01/01 00:00:00,1,0
"POLYGON ((500000 6001000,501000 6001000,500500 6001500,500000 6001000))",Plain,1e-7,值五,2147483647,42,2031/07/08,2031/07/08 09:10:11,,3.25
`;

/** Types the columns, which CSV cannot. */
const TYPING = `<OGRVRTDataSource><OGRVRTLayer name="areas">
<SrcDataSource relativeToVRT="1">rows.csv</SrcDataSource>
<OpenOptions><OOI key="EMPTY_STRING_AS_NULL">YES</OOI></OpenOptions>
<SrcLayer>rows</SrcLayer>
<GeometryType>wkbUnknown</GeometryType><LayerSRS>${INVENTED_CRS}</LayerSRS>
<GeometryField encoding="WKT" field="WKT"/>
<Field name="name"/><Field name="é" type="Real"/><Field name="中文"/>
<Field name="count" type="Integer"/><Field name="big" type="Integer64"/>
<Field name="day" type="Date"/><Field name="moment" type="DateTime"/>
<Field name="flag" type="Integer" subtype="Boolean"/>
<Field name="single" type="Real" subtype="Float32"/>
</OGRVRTLayer></OGRVRTDataSource>`;

/** Writes the layer as a GeoPackage by native GDAL, with a binary field, and returns its path. */
export async function writeInventedAreas(folder: string): Promise<string> {
  await Deno.writeTextFile(join(folder, "rows.csv"), ROWS);
  await Deno.writeTextFile(join(folder, "typing.vrt"), TYPING);
  const path = join(folder, "areas.gpkg");
  await nativeGdal("ogr2ogr", ["-lco", "SPATIAL_INDEX=NO", path, join(folder, "typing.vrt")]);
  const database = new DatabaseSync(path);
  database.exec(`ALTER TABLE areas ADD COLUMN raw BLOB;
    UPDATE areas SET raw = x'0001FF' WHERE fid = 1;
    UPDATE areas SET "中文" = '' WHERE fid = 4;`);
  database.close();
  return path;
}
