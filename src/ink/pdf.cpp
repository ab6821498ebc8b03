// Document structure of ISO 32000-1 (PDF 1.7), 7.7 and 12; metadata also as XMP (ISO 16684-1).
// Nothing depends on the clock: no dates, and the file's identifier comes from its contents.
#include "ink/pdf.hpp"

#include <fmt/format.h>
#include <qpdf/Buffer.hh>
#include <qpdf/QPDF.hh>
#include <qpdf/QPDFObjectHandle.hh>
#include <qpdf/QPDFPageDocumentHelper.hh>
#include <qpdf/QPDFWriter.hh>

#include "ink/compress.hpp"
#include "ink/content.hpp"
#include "ink/fonts.hpp"
#include "ink/pictures.hpp"

namespace duskleaf {
namespace {

using Object = QPDFObjectHandle;

constexpr double pt_per_mm = 72 / 25.4;

Object text_string(const std::string& utf8) { return Object::newUnicodeString(utf8); }

Object numbers(std::initializer_list<double> values) {
  Object array = Object::newArray();
  for (const double value : values) array.appendItem(Object::newReal(value, 2, true));
  return array;
}

/// A link target in ASCII: bytes that a URI cannot hold are percent-encoded (RFC 3986).
std::string ascii_uri(std::string_view url) {
  std::string uri;
  for (const char c : url) {
    const auto byte = static_cast<unsigned char>(c);
    if (byte <= 0x20 || byte >= 0x7F || c == '"' || c == '<' || c == '>')
      uri += fmt::format("%{:02X}", byte);
    else
      uri += c;
  }
  return uri;
}

void add_links(const std::vector<Mark>& marks, double height_mm, Object& annotations) {
  for (const Mark& mark : marks) {
    if (const auto* group = std::get_if<std::shared_ptr<ClipGroup>>(&mark);
        group != nullptr && *group)
      add_links((*group)->marks, height_mm, annotations);
    const auto* link = std::get_if<Link>(&mark);
    if (link == nullptr) continue;
    Object action = Object::newDictionary();
    action.replaceKey("/S", Object::newName("/URI"));
    action.replaceKey("/URI", Object::newString(ascii_uri(link->url)));
    Object annotation = Object::newDictionary();
    annotation.replaceKey("/Type", Object::newName("/Annot"));
    annotation.replaceKey("/Subtype", Object::newName("/Link"));
    annotation.replaceKey(
        "/Rect", numbers({link->box.x * pt_per_mm, (height_mm - link->box.bottom()) * pt_per_mm,
                          link->box.right() * pt_per_mm, (height_mm - link->box.y) * pt_per_mm}));
    annotation.replaceKey("/Border", numbers({0, 0, 0}));
    annotation.replaceKey("/F", Object::newInteger(4));  // printed
    annotation.replaceKey("/Contents", text_string(link->url));
    annotation.replaceKey("/A", action);
    annotations.appendItem(annotation);
  }
}

void add_pages(QPDF& pdf, const SheetDocument& document, DocumentFonts& fonts,
               DocumentPictures& pictures) {
  Object resources = pdf.makeIndirectObject(Object::newDictionary());
  QPDFPageDocumentHelper pages(pdf);
  for (const Sheet& sheet : document.sheets) {
    Object content = Object::newStream(&pdf);
    content.replaceStreamData(deflated(page_content(sheet, fonts, pictures)),
                              Object::newName("/FlateDecode"), Object::newNull());
    Object page = Object::newDictionary();
    page.replaceKey("/Type", Object::newName("/Page"));
    page.replaceKey("/MediaBox",
                    numbers({0, 0, sheet.width_mm * pt_per_mm, sheet.height_mm * pt_per_mm}));
    page.replaceKey("/Resources", resources);
    page.replaceKey("/Contents", content);
    Object annotations = Object::newArray();
    add_links(sheet.marks, sheet.height_mm, annotations);
    if (annotations.getArrayNItems() > 0) page.replaceKey("/Annots", annotations);
    pages.addPage(pdf.makeIndirectObject(page), false);
  }
  resources.replaceKey("/Font", fonts.make(pdf));
  resources.replaceKey("/XObject", pictures.make(pdf));
}

void add_bookmarks(QPDF& pdf, const SheetDocument& document) {
  const std::vector<Object>& pages = pdf.getAllPages();
  std::vector<Object> entries;
  for (std::size_t i = 0; i < pages.size(); ++i) {
    if (document.sheets[i].bookmark.empty()) continue;
    Object target = Object::newArray();
    target.appendItem(pages[i]);
    target.appendItem(Object::newName("/Fit"));
    Object entry = Object::newDictionary();
    entry.replaceKey("/Title", text_string(document.sheets[i].bookmark));
    entry.replaceKey("/Dest", target);
    entries.push_back(pdf.makeIndirectObject(entry));
  }
  if (entries.empty()) return;
  Object outlines = pdf.makeIndirectObject(Object::newDictionary());
  for (std::size_t i = 0; i < entries.size(); ++i) {
    entries[i].replaceKey("/Parent", outlines);
    if (i > 0) entries[i].replaceKey("/Prev", entries[i - 1]);
    if (i + 1 < entries.size()) entries[i].replaceKey("/Next", entries[i + 1]);
  }
  outlines.replaceKey("/Type", Object::newName("/Outlines"));
  outlines.replaceKey("/First", entries.front());
  outlines.replaceKey("/Last", entries.back());
  outlines.replaceKey("/Count", Object::newInteger(static_cast<long long>(entries.size())));
  pdf.getRoot().replaceKey("/Outlines", outlines);
}

/// Metadata and bookmarks are single lines.
std::string one_line(std::string text) {
  for (char& c : text)
    if (static_cast<unsigned char>(c) < 0x20 || c == 0x7F) c = ' ';
  return text;
}

std::string xml(std::string_view text) {
  std::string escaped;
  for (const char c : text) {
    if (c == '&')
      escaped += "&amp;";
    else if (c == '<')
      escaped += "&lt;";
    else if (c == '>')
      escaped += "&gt;";
    else
      escaped += c;
  }
  return escaped;
}

void add_metadata(QPDF& pdf, const SheetDocument& document) {
  Object info = Object::newDictionary();
  const auto put = [&](const char* key, const std::string& value) {
    if (!value.empty()) info.replaceKey(key, text_string(one_line(value)));
  };
  put("/Title", document.title);
  put("/Author", document.author);
  put("/Subject", document.subject);
  put("/Creator", "duskleaf");
  put("/Producer", "duskleaf");
  pdf.getTrailer().replaceKey("/Info", pdf.makeIndirectObject(info));

  std::string packet =
      "<?xpacket begin=\"\xEF\xBB\xBF\" id=\"W5M0MpCehiHzreSzNTczkc9d\"?>\n"
      "<x:xmpmeta xmlns:x=\"adobe:ns:meta/\"><rdf:RDF "
      "xmlns:rdf=\"http://www.w3.org/1999/02/22-rdf-syntax-ns#\">\n"
      "<rdf:Description rdf:about=\"\" xmlns:dc=\"http://purl.org/dc/elements/1.1/\""
      " xmlns:pdf=\"http://ns.adobe.com/pdf/1.3/\" xmlns:xmp=\"http://ns.adobe.com/xap/1.0/\">\n"
      "<dc:format>application/pdf</dc:format>\n";
  const auto element = [&](std::string_view name, std::string_view list, std::string_view attribute,
                           const std::string& value) {
    if (!value.empty())
      packet += fmt::format("<dc:{0}><rdf:{1}><rdf:li{2}>{3}</rdf:li></rdf:{1}></dc:{0}>\n", name,
                            list, attribute, xml(one_line(value)));
  };
  element("title", "Alt", " xml:lang=\"x-default\"", document.title);
  element("creator", "Seq", "", document.author);
  element("description", "Alt", " xml:lang=\"x-default\"", document.subject);
  element("language", "Bag", "", document.language);
  packet +=
      "<pdf:Producer>duskleaf</pdf:Producer><xmp:CreatorTool>duskleaf</xmp:CreatorTool>\n"
      "</rdf:Description></rdf:RDF></x:xmpmeta>\n<?xpacket end=\"r\"?>";
  Object metadata = Object::newStream(&pdf, packet);
  metadata.getDict().replaceKey("/Type", Object::newName("/Metadata"));
  metadata.getDict().replaceKey("/Subtype", Object::newName("/XML"));

  Object root = pdf.getRoot();
  root.replaceKey("/Metadata", metadata);
  if (!document.language.empty()) root.replaceKey("/Lang", text_string(document.language));
  Object preferences = Object::newDictionary();
  preferences.replaceKey("/DisplayDocTitle", Object::newBool(true));
  root.replaceKey("/ViewerPreferences", preferences);
}

}  // namespace

std::string make_pdf(const SheetDocument& document, const TypeSet& type) {
  QPDF pdf;
  pdf.emptyPDF();
  DocumentFonts fonts(type);
  DocumentPictures pictures;
  add_pages(pdf, document, fonts, pictures);
  add_bookmarks(pdf, document);
  add_metadata(pdf, document);

  QPDFWriter writer(pdf);
  writer.setOutputMemory();
  writer.setMinimumPDFVersion("1.7");
  writer.setObjectStreamMode(qpdf_o_generate);
  writer.setStreamDataMode(qpdf_s_preserve);  // all streams are packed already
  writer.setCompressStreams(true);            // the object streams too
  writer.setDeterministicID(true);
  writer.write();
  const std::shared_ptr<Buffer> bytes = writer.getBufferSharedPointer();
  return {reinterpret_cast<const char*>(bytes->getBuffer()), bytes->getSize()};
}

}  // namespace duskleaf
