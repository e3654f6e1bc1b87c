// Reads all model files together and checks what can be checked only across them.
#include <fmt/format.h>

#include <algorithm>
#include <deque>

#include "chemistry/compile.hpp"
#include "chemistry/embedded_models.hpp"
#include "input/file_text.hpp"
#include "input/model_draft.hpp"
#include "input/sha256.hpp"
#include "input/toml_cursor.hpp"
#include "ionledger/readers.hpp"

namespace ionledger {
namespace {

/// One file, kept until everything is checked because cursors refer to it.
struct Document {
  std::string file;
  TomlFindings findings;
  TomlNode root;
};

class ModelReader {
 public:
  explicit ModelReader(Diagnostics& diagnostics) : diagnostics_(diagnostics) {}

  std::optional<Models> read(const std::vector<ModelFile>& files) {
    for (const ModelFile& file : files) parse(file);
    // Everything else counts on the basis being first.
    for (Document& document : documents_) read_set_and_basis(document);
    for (Document& document : documents_) read_tables(document);
    whole_set();
    cross_checks();
    if (failed()) return std::nullopt;
    Models& models = draft_.models;
    if (!compile_chemistry(models.chemistry, draft_.where, diagnostics_) ||
        !compile_supplies(models.supplies, models.chemistry, draft_.where, diagnostics_)) {
      return std::nullopt;
    }
    models.chemistry.digest = digest(files);
    return std::move(models);
  }

 private:
  /// Names and texts are each ended by a zero byte, so that nothing can move between them.
  static std::string digest(const std::vector<ModelFile>& files) {
    std::string bytes;
    for (const ModelFile& file : files) bytes += file.name + '\0' + file.text + '\0';
    return "sha256:" + sha256(bytes);
  }

  void parse(const ModelFile& file) {
    const auto text = readable_text(file.text, file.name, diagnostics_);
    if (!text) {
      unreadable_ = true;
      return;
    }
    documents_.push_back({file.name, TomlFindings(file.name, diagnostics_), {}});
    Document& document = documents_.back();
    if (auto root = parse_toml(*text, document.findings)) document.root = std::move(*root);
  }

  static std::vector<TomlCursor> tables(TomlCursor& root, const std::string& key) {
    const auto array = root.find(key);
    if (!array) return {};
    auto items = array->items(fmt::format("[[{}]]", key));
    items.erase(std::remove_if(items.begin(),
                               items.end(),
                               [](const TomlCursor& item) { return !item.must_be_table(); }),
                items.end());
    return items;
  }

  void read_set_and_basis(Document& document) {
    TomlCursor root(document.root, "", document.findings);
    Models& models = draft_.models;
    auto set = root.find("set");
    if (set && set->must_be_table() && draft_.define("set", "", *set)) {
      models.chemistry.name = set->text_at("name", "the name of this coherent set");
      models.default_activity_model = set->text_at("default_activity", "an activity model");
      if (const auto model = set->find("default_activity")) draft_.named_models.push_back(*model);
      set->refuse_unknown_keys();
    }
    for (TomlCursor& table : tables(root, "basis")) read_basis(table, document.file, draft_);
  }

  void read_tables(Document& document) {
    TomlCursor root(document.root, "", document.findings);
    const std::string& file = document.file;
    for (TomlCursor& table : tables(root, "species")) read_species(table, false, file, draft_);
    for (TomlCursor& table : tables(root, "pair")) read_species(table, true, file, draft_);
    for (TomlCursor& table : tables(root, "mineral")) read_mineral(table, file, draft_);
    for (TomlCursor& table : tables(root, "gas")) read_gas(table, file, draft_);
    for (TomlCursor& table : tables(root, "constituent")) read_constituent(table, draft_);
    for (TomlCursor& table : tables(root, "ambiguous")) read_ambiguous_word(table, draft_);
    for (TomlCursor& table : tables(root, "activity_model")) read_activity_model(table, draft_);
    for (TomlCursor& table : tables(root, "reagent")) read_reagent(table, draft_);
    for (TomlCursor& table : tables(root, "resin")) read_resin(table, draft_);
    for (TomlCursor& table : tables(root, "atmosphere")) read_atmosphere(table, draft_);
    for (TomlCursor& table : tables(root, "incompatible")) read_incompatible(table, draft_);
    for (TomlCursor& table : tables(root, "solid_density")) read_solid_density(table, draft_);
    for (TomlCursor& table : tables(root, "source")) read_source(table);
    read_single(root, "conductivity", read_conductivity);
    read_single(root, "index_roles", read_index_roles);
    read_single(root, "dissolved_solids", read_dissolved_solids);
    // Read before, in read_set_and_basis.
    static_cast<void>(root.find("set"));
    static_cast<void>(root.find("basis"));
    root.refuse_unknown_keys();
  }

  /// A table that all files together hold once.
  void read_single(TomlCursor& root, const char* key, void (*reader)(TomlCursor&, ModelDraft&)) {
    auto table = root.find(key);
    if (table && table->must_be_table() && draft_.define("table", key, *table)) {
      reader(*table, draft_);
    }
  }

  void read_source(TomlCursor& table) {
    const std::string key = table.text_at("key", "a short name for the source");
    const std::string citation = table.text_at("citation", "the full citation");
    table.refuse_unknown_keys();
    if (draft_.define("source", key, table)) draft_.models.chemistry.sources[key] = citation;
  }

  /// What no single table can be blamed for.
  void whole_set() {
    if (failed()) return;
    const Chemistry& chemistry = draft_.models.chemistry;
    if (draft_.where.count("set:") == 0) {
      refuse_set("no model file has a [set]", "[set] with name and default_activity");
    }
    if (chemistry.n_basis == 0 || chemistry.species.front().name != "H+") {
      refuse_set("the first [[basis]] species is not H+",
                 "species = \"H+\" in the first [[basis]]");
    }
  }

  void refuse_set(std::string summary, std::string expected) {
    diagnostics_.error({"models", 0, 0}, std::move(summary), "", std::move(expected));
    unreadable_ = true;
  }

  void cross_checks() {
    for (const TomlCursor& source : draft_.cited_sources) {
      refuse_unless_known(source, "source", "a key of some [[source]]");
    }
    for (const TomlCursor& model : draft_.named_models) {
      refuse_unless_known(model, "activity_model", "the name of some [[activity_model]]");
    }
    for (const TomlCursor& value : draft_.species_values) {
      refuse_unless_known(value, "species", "a species of [[basis]], [[species]] or [[pair]]");
    }
    for (const TomlCursor& value : draft_.mineral_values) {
      refuse_unless_known(value, "mineral", "the name of some [[mineral]]");
    }
    for (const TomlCursor& entry : draft_.named_species) {
      if (draft_.models.chemistry.species_index(entry.key()) >= 0) continue;
      entry.key_error(fmt::format("there is no species {}", excerpt(entry.key())),
                      "a species of [[basis]], [[species]] or [[pair]]",
                      nearest("species", entry.key()));
    }
  }

  void refuse_unless_known(const TomlCursor& value,
                           const std::string& kind,
                           const std::string& expected) {
    const std::string name = value.text(expected).value_or("");
    if (name.empty() || draft_.where.count(kind + ":" + name) != 0) return;
    value.error(
        fmt::format("there is no {} {}", kind, excerpt(name)), expected, nearest(kind, name));
  }

  [[nodiscard]] std::string nearest(const std::string& kind, const std::string& name) const {
    std::vector<std::string> known;
    for (const auto& [place, span] : draft_.where) {
      if (place.rfind(kind + ":", 0) == 0) known.push_back(place.substr(kind.size() + 1));
    }
    const std::string word = nearest_word(name, known);
    return word.empty() ? "" : fmt::format("did you mean \"{}\"?", word);
  }

  [[nodiscard]] bool failed() const {
    return unreadable_ ||
           std::any_of(documents_.begin(), documents_.end(), [](const Document& document) {
             return document.findings.any();
           });
  }

  Diagnostics& diagnostics_;
  std::deque<Document> documents_;  // a deque: cursors keep pointers into it
  ModelDraft draft_;
  bool unreadable_ = false;
};

}  // namespace

bool ModelDraft::define(const std::string& kind, const std::string& name, const TomlCursor& table) {
  if (name.empty() && kind != "set") return false;  // its absence is an error already
  const auto [first, is_new] = where.emplace(kind + ":" + name, table.span());
  if (!is_new) {
    table.error(
        fmt::format("{} is defined twice", name.empty() ? "[" + kind + "]" : excerpt(name)),
        fmt::format(
            "one definition; the first is at {}:{}", first->second.file, first->second.line));
  }
  return is_new;
}

std::string ModelDraft::cite(TomlCursor& table) {
  const char* const expected = "the key of a [[source]]";
  const std::string key = table.text_at("source", expected);
  if (const auto source = table.find("source")) cited_sources.push_back(*source);
  return key;
}

const ActivityModel* Models::activity_model(std::string_view name) const {
  const auto found = std::find_if(activity_models.begin(),
                                  activity_models.end(),
                                  [&](const ActivityModel& model) { return model.name == name; });
  return found == activity_models.end() ? nullptr : &*found;
}

std::optional<Models> read_models(const std::vector<ModelFile>& files, Diagnostics& diagnostics) {
  std::vector<ModelFile> in_order = files;
  std::stable_sort(in_order.begin(), in_order.end(), [](const ModelFile& a, const ModelFile& b) {
    return a.name < b.name;
  });
  return ModelReader(diagnostics).read(in_order);
}

std::vector<ModelFile> built_in_models() {
  std::vector<ModelFile> files;
  for (const ModelText& model : embedded_models()) {
    files.push_back({model.name, std::string(model.text)});
  }
  return files;
}

}  // namespace ionledger
