// Tables that say what the words of a laboratory report mean.
#include <fmt/format.h>

#include "input/file_text.hpp"
#include "input/model_draft.hpp"

namespace ionledger {
namespace {

Constituent::Kind read_kind(TomlCursor& table) {
  const char* const expected = "\"alkalinity\" or \"hardness\"; left out for a total";
  const auto value = table.find("kind");
  if (!value) return Constituent::Kind::total;
  const auto text = value->text(expected);
  if (text == "hardness") return Constituent::Kind::hardness;
  if (text && text != "alkalinity") {
    value->error(fmt::format("{} is not a kind of constituent", excerpt(*text)), expected);
  }
  return Constituent::Kind::alkalinity;
}

}  // namespace

std::vector<std::string> read_texts(TomlCursor& table,
                                    const std::string& key,
                                    const std::string& expected) {
  std::vector<std::string> texts;
  const auto array = table.find(key);
  if (!array) return texts;
  for (const TomlCursor& item : array->items(expected)) {
    texts.push_back(item.text(expected).value_or(""));
  }
  return texts;
}

void read_constituent(TomlCursor& table, ModelDraft& draft) {
  Constituent constituent;
  constituent.name = table.text_at("name", "such as \"calcium\"");
  constituent.symbols = read_texts(table, "symbols", "texts such as [\"Ca\", \"Ca+2\"]");
  constituent.kind = read_kind(table);
  constituent.basis_species = table.text_if("species", "a basis species such as \"Ca+2\"");
  constituent.parts = read_texts(table, "parts", "basis species such as [\"Ca+2\", \"Mg+2\"]");
  constituent.mostly = table.text_at("mostly", "the species it mostly is near pH 7");
  constituent.plain = table.text_if("plain", "what mg/L means without \"as\"");
  constituent.equivalents =
      table.number_if("equivalents", "equivalents in one mole, a number").value_or(0);
  if (constituent.equivalents < 0) {
    table.find("equivalents")->error("equivalents are negative", "zero or more");
  }
  constituent.is_major = table.flag("is_major", false);
  const char* const expected_as = "a table such as { Ca = 1, CaCO3 = 1 }";
  auto as = table.require("as", expected_as);
  if (as && as->must_be_table()) {
    for (const TomlCursor& entry : as->entries()) {
      constituent.as[entry.key()] = entry.number(expected_as).value_or(0);
    }
  }
  table.refuse_unknown_keys();
  bool is_new = draft.define("constituent", constituent.name, table);
  is_new = draft.define("word", constituent.name, table) && is_new;
  for (const std::string& symbol : constituent.symbols) {
    is_new = draft.define("word", symbol, table) && is_new;
  }
  if (is_new) draft.models.chemistry.constituents.push_back(std::move(constituent));
}

void read_ambiguous_word(TomlCursor& table, ModelDraft& draft) {
  AmbiguousWord ambiguous;
  ambiguous.word = table.text_at("word", "such as \"iron\"");
  ambiguous.question =
      table.text_at("question", "the choice, such as \"this (...) or that (...)?\"");
  table.refuse_unknown_keys();
  if (draft.define("word", ambiguous.word, table)) {
    draft.models.chemistry.ambiguous_words.push_back(std::move(ambiguous));
  }
}

}  // namespace ionledger
