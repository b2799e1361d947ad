/** The elements of WaterML 2.0 that the program writes, with their order and their types, put down anew from the standard
 *  (OGC 10-126r4 and its schema 2.0.2; OM 2.0, OGC 10-025r1; GML 3.2.1; SWE Common 2.0): what that schema allows beyond
 *  them is left out, so that whatever fits here fits there. */

const W3C = 'http://www.w3.org/2001/XMLSchema';
const URIS = {
  wml2: 'http://www.opengis.net/waterml/2.0',
  om: 'http://www.opengis.net/om/2.0',
  sa: 'http://www.opengis.net/sampling/2.0',
  sams: 'http://www.opengis.net/samplingSpatial/2.0',
  gml: 'http://www.opengis.net/gml/3.2',
  swe: 'http://www.opengis.net/swe/2.0',
  xlink: 'http://www.w3.org/1999/xlink',
};
type Prefix = keyof typeof URIS;

function schema(own: Prefix, content: string): { fileName: string; contents: string } {
  const others = (Object.keys(URIS) as Prefix[]).filter((prefix) => prefix !== own);
  const spaces = Object.entries(URIS).map(([prefix, uri]) => `xmlns:${prefix}="${uri}"`);
  const imports = others.map((prefix) => `<import namespace="${URIS[prefix]}" schemaLocation="${prefix}.xsd"/>`);
  return {
    fileName: `${own}.xsd`,
    contents: `<schema xmlns="${W3C}" ${spaces.join(' ')} targetNamespace="${URIS[own]}" elementFormDefault="qualified">${imports.join('')}${content}</schema>`,
  };
}

const element = (name: string, type: string, occurs = '') => `<element name="${name}" type="${type}" ${occurs}/>`;
const OPTIONAL = 'minOccurs="0"';
const SEVERAL = 'minOccurs="0" maxOccurs="unbounded"';
const id = '<attribute ref="gml:id" use="required"/>';
const object = (name: string, sequence: string) =>
  `<element name="${name}"><complexType><sequence>${sequence}</sequence>${id}</complexType></element>`;
/** An element around one object, or with a link to it, or with a reason why there is none. */
const property = (name: string, content: string) =>
  `<complexType name="${name}"><sequence minOccurs="0">${content}</sequence><attribute ref="xlink:href"/><attribute ref="xlink:title"/><attribute name="nilReason" type="string"/></complexType>`;

export const SCHEMAS = [
  schema(
    'wml2',
    [
      object(
        'Collection',
        `${element('metadata', 'wml2:DocumentMetadataProperty')}${element('localDictionary', 'wml2:DictionaryProperty', SEVERAL)}${element('observationMember', 'wml2:ObservationProperty', SEVERAL)}`,
      ),
      property('DocumentMetadataProperty', '<element ref="wml2:DocumentMetadata"/>'),
      property('DictionaryProperty', '<element ref="gml:Dictionary"/>'),
      property('ObservationProperty', '<element ref="om:OM_Observation"/>'),
      object(
        'DocumentMetadata',
        `${element('generationDate', 'dateTime')}${element('version', 'gml:Reference', OPTIONAL)}${element('generationSystem', 'string', OPTIONAL)}`,
      ),
      object(
        'MonitoringPoint',
        `<element ref="gml:identifier" minOccurs="0"/><element ref="gml:name" ${SEVERAL}/><element ref="sa:sampledFeature" maxOccurs="unbounded"/><element ref="sa:parameter" ${SEVERAL}/><element ref="sams:shape"/>`,
      ),
      object(
        'ObservationProcess',
        `${element('processType', 'gml:Reference')}${element('aggregationDuration', 'duration', OPTIONAL)}`,
      ),
      object(
        'MeasurementTimeseries',
        `${element('defaultPointMetadata', 'wml2:DefaultMetadataProperty', SEVERAL)}<element name="point" maxOccurs="unbounded" minOccurs="0"><complexType><sequence><element ref="wml2:MeasurementTVP"/></sequence></complexType></element>`,
      ),
      property('DefaultMetadataProperty', element('DefaultTVPMeasurementMetadata', 'wml2:TVPMeasurementMetadata')),
      property('MetadataProperty', element('TVPMeasurementMetadata', 'wml2:TVPMeasurementMetadata')),
      `<element name="MeasurementTVP"><complexType><sequence>${element('time', 'gml:TimePosition', OPTIONAL)}${element('value', 'double', 'minOccurs="0" nillable="true"')}${element('metadata', 'wml2:MetadataProperty', OPTIONAL)}</sequence></complexType></element>`,
      `<complexType name="TVPMeasurementMetadata"><sequence>${[
        ['quality', 'gml:Reference', OPTIONAL],
        ['nilReason', 'gml:Reference', OPTIONAL],
        ['qualifier', 'swe:QualityProperty', SEVERAL],
        ['uom', 'swe:UnitReference', OPTIONAL],
        ['interpolationType', 'gml:Reference', OPTIONAL],
        ['censoredReason', 'gml:Reference', OPTIONAL],
        ['aggregationDuration', 'duration', OPTIONAL],
      ]
        .map(([name, type, occurs]) => element(name, type, occurs))
        .join('')}</sequence></complexType>`,
    ].join(''),
  ),
  schema(
    'om',
    [
      object(
        'OM_Observation',
        `${element('phenomenonTime', 'om:TimeProperty')}${element('resultTime', 'om:TimeProperty')}${element('procedure', 'om:ProcessProperty')}${element('observedProperty', 'gml:Reference')}${element('featureOfInterest', 'om:FeatureProperty')}${element('result', 'om:ResultProperty')}`,
      ),
      property('TimeProperty', '<element ref="gml:TimePeriod"/>'),
      property('ProcessProperty', '<element ref="wml2:ObservationProcess"/>'),
      property('FeatureProperty', '<element ref="wml2:MonitoringPoint"/>'),
      property('ResultProperty', '<element ref="wml2:MeasurementTimeseries"/>'),
      `<element name="NamedValue"><complexType><sequence>${element('name', 'gml:Reference')}${element('value', 'anyType')}</sequence></complexType></element>`,
    ].join(''),
  ),
  schema(
    'sa',
    `<element name="sampledFeature" type="gml:Reference"/><element name="parameter"><complexType><sequence><element ref="om:NamedValue"/></sequence></complexType></element>`,
  ),
  schema('sams', `${property('Shape', '<element ref="gml:Point"/>')}<element name="shape" type="sams:Shape"/>`),
  schema(
    'gml',
    [
      '<attribute name="id" type="ID"/>',
      property('Reference', ''),
      '<complexType name="Code"><simpleContent><extension base="string"><attribute name="codeSpace" type="anyURI"/></extension></simpleContent></complexType>',
      '<complexType name="CodeWithAuthority"><simpleContent><extension base="string"><attribute name="codeSpace" type="anyURI" use="required"/></extension></simpleContent></complexType>',
      '<element name="identifier" type="gml:CodeWithAuthority"/><element name="name" type="gml:Code"/>',
      '<simpleType name="TimePosition"><union memberTypes="date dateTime gYear gYearMonth"/></simpleType>',
      '<complexType name="MeasureType"><simpleContent><extension base="double"><attribute name="uom" type="string" use="required"/></extension></simpleContent></complexType>',
      object(
        'TimePeriod',
        `${element('beginPosition', 'gml:TimePosition')}${element('endPosition', 'gml:TimePosition')}`,
      ),
      '<simpleType name="Doubles"><list itemType="double"/></simpleType>',
      `<element name="Point"><complexType><sequence><element name="pos"><complexType><simpleContent><extension base="gml:Doubles"><attribute name="srsName" type="anyURI"/></extension></simpleContent></complexType></element></sequence>${id}</complexType></element>`,
      object(
        'Dictionary',
        `<element ref="gml:identifier"/><element name="dictionaryEntry" ${SEVERAL}><complexType><sequence><element ref="gml:Definition"/></sequence></complexType></element>`,
      ),
      object(
        'Definition',
        `<element ref="gml:identifier"/><element ref="gml:name"/>${element('remarks', 'string', OPTIONAL)}`,
      ),
    ].join(''),
  ),
  schema(
    'swe',
    [
      property('QualityProperty', '<element ref="swe:Category"/>'),
      `<element name="Category"><complexType><sequence>${element('description', 'string', OPTIONAL)}${element('value', 'token', OPTIONAL)}</sequence><attribute name="definition" type="anyURI" use="required"/></complexType></element>`,
      '<simpleType name="UomSymbol"><restriction base="string"><pattern value="[^: \\n\\r\\t]+"/></restriction></simpleType>',
      '<complexType name="UnitReference"><attribute name="code" type="swe:UomSymbol"/><attribute ref="xlink:href"/><attribute ref="xlink:title"/></complexType>',
    ].join(''),
  ),
  schema('xlink', '<attribute name="href" type="anyURI"/><attribute name="title" type="string"/>'),
];
