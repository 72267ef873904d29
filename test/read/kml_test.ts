import assert from "node:assert/strict";
import { UnreadableError } from "../../lib/layer/errors.ts";
import { kmlToGeoJson } from "../../lib/read/kml.ts";
import { fault } from "../support/fault.ts";

interface Feature {
  readonly properties: Readonly<Record<string, unknown>>;
  readonly geometry: unknown;
}

function converted(kml: string): { name: string; features: Feature[] } {
  return JSON.parse(kmlToGeoJson("map.kml", new TextEncoder().encode(kml)).text);
}

const ring = (text: string) => `<LinearRing><coordinates>${text}</coordinates></LinearRing>`;

Deno.test("kmlToGeoJson() reads extended data by their schema and text as text", () => {
  const { name, features } = converted(`<kml xmlns="http://www.opengis.net/kml/2.2"><Document>
    <Schema name="s" id="s"><SimpleField name="pop" type="int"/><SimpleField type="float" name="rate"/>
      <SimpleField name="code" type="string"/><SimpleField name="urban" type="bool"/></Schema>
    <Folder><name>Towns &amp; cities</name>
    <Placemark><name>Ærø</name><ExtendedData><SchemaData schemaUrl="#s">
      <SimpleData name="pop">7</SimpleData><SimpleData name="rate">1.5e-3</SimpleData>
      <SimpleData name="code">0042</SimpleData><SimpleData name="urban">true</SimpleData>
    </SchemaData></ExtendedData></Placemark>
    <Placemark><ExtendedData><SchemaData schemaUrl="#s"><SimpleData name="rate">n/a</SimpleData>
      <SimpleData name="pop"> </SimpleData></SchemaData>
      <Data name="note"><displayName>Note</displayName><value><![CDATA[<b>x</b>]]></value></Data>
    </ExtendedData></Placemark></Folder></Document></kml>`);
  assert.equal(name, "Towns & cities");
  assert.deepEqual(features.map(({ properties }) => properties), [
    { name: "Ærø", pop: 7, rate: 0.0015, code: "0042", urban: true, note: null },
    { name: null, pop: null, rate: "n/a", code: null, urban: null, note: "<b>x</b>" },
  ]);
});

Deno.test("kmlToGeoJson() reads every geometry, prefixed elements too", () => {
  const outer = ring("0,0,5 4,0,5 4,4,5 0,0,5"), inner = ring("1,1,5\n2,1,5\n2,2,5\n1,1,5");
  const { features } = converted(`<k:kml xmlns:k="urn:x"><k:Placemark><k:Point>
      <k:coordinates> 9.5 , -54.25 </k:coordinates></k:Point></k:Placemark>
    <Placemark><Polygon><innerBoundaryIs>${inner}</innerBoundaryIs>
      <outerBoundaryIs>${outer}</outerBoundaryIs></Polygon></Placemark>
    <Placemark><MultiGeometry><Point><coordinates>1,2</coordinates></Point>
      <Point><coordinates>3,4</coordinates></Point></MultiGeometry></Placemark>
    <Placemark><MultiGeometry><Point><coordinates>1,2</coordinates></Point>
      <LineString><coordinates>0,0 1,1</coordinates></LineString></MultiGeometry></Placemark>
    <Placemark><name>nowhere</name><Polygon/></Placemark></k:kml>`);
  assert.deepEqual(features.map(({ geometry }) => geometry), [
    { type: "Point", coordinates: [9.5, -54.25, 0] },
    {
      type: "Polygon",
      coordinates: [
        [[0, 0, 5], [4, 0, 5], [4, 4, 5], [0, 0, 5]],
        [[1, 1, 5], [2, 1, 5], [2, 2, 5], [1, 1, 5]],
      ],
    },
    { type: "MultiPoint", coordinates: [[1, 2, 0], [3, 4, 0]] },
    {
      type: "GeometryCollection",
      geometries: [
        { type: "Point", coordinates: [1, 2, 0] },
        { type: "LineString", coordinates: [[0, 0, 0], [1, 1, 0]] },
      ],
    },
    null,
  ]);
});

Deno.test("kmlToGeoJson() leaves out altitudes that are all 0", () => {
  const { features } = converted(
    `<kml><Placemark><Point><coordinates>1,2,0</coordinates></Point></Placemark></kml>`,
  );
  assert.deepEqual(features[0].geometry, { type: "Point", coordinates: [1, 2] });
});

Deno.test("kmlToGeoJson() tells the folders apart where there are several", () => {
  const { name, features } = converted(`<kml><Document><name>All</name>
    <Folder><name>North</name><Placemark><name>a</name></Placemark></Folder>
    <Folder><Placemark><name>b</name></Placemark><name>South</name></Folder></Document></kml>`);
  assert.equal(name, "map");
  assert.deepEqual(features.map(({ properties }) => properties), [
    { name: "a", folder: "North" },
    { name: "b", folder: "South" },
  ]);
});

Deno.test("kmlToGeoJson() keeps a field called name instead of the placemark's own", () => {
  const { features } = converted(`<kml><Placemark><name>label</name><ExtendedData>
    <Data name="name"><value>field</value></Data></ExtendedData></Placemark></kml>`);
  assert.deepEqual(features[0].properties, { name: "field" });
});

Deno.test("kmlToGeoJson() reads the encoding that the file declares", () => {
  const kml =
    `<?xml version="1.0" encoding="windows-1252"?><kml><Placemark><name>\xdcnter</name></Placemark></kml>`;
  const bytes = Uint8Array.from(kml, (character) => character.charCodeAt(0));
  assert.match(kmlToGeoJson("a.kml", bytes).text, /Ünter/);
  const unknown = new TextEncoder().encode(`<?xml version="1.0" encoding="klingon"?><kml/>`);
  assert.throws(() => kmlToGeoJson("a.kml", unknown), fault(UnreadableError, /encoding klingon/));
});

Deno.test("kmlToGeoJson() gives the line of what is not well-formed", () => {
  assert.throws(
    () => kmlToGeoJson("a.kml", new TextEncoder().encode("<kml>\n<Placemark>\n</kml>")),
    fault(UnreadableError, /Cannot read a\.kml as KML \(3:/),
  );
});
