// What is gathered while the tables of all model files are read, before the chemistry is compiled.
// Separate because each kind of table has its own reader.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "input/toml_cursor.hpp"
#include "ionledger/readers.hpp"

namespace ionledger {

/// The models so far, and what can be checked only when every file has been read.
struct ModelDraft {
  Models models;
  std::map<std::string, SourceSpan> where;  ///< "species:CaCO3" -> the table that defines it.
  std::vector<TomlCursor> cited_sources;    ///< Values that must be keys of sources.
  std::vector<TomlCursor> named_species;    ///< Entries whose key must be a species.
  std::vector<TomlCursor> named_models;     ///< Values that must be names of activity models.
  std::vector<TomlCursor> species_values;   ///< Values that must be names of species.
  std::vector<TomlCursor> mineral_values;   ///< Values that must be names of minerals.

  /// Records that `table` defines `name`; an error, and false, when another one does.
  bool define(const std::string& kind, const std::string& name, const TomlCursor& table);
  /// The text under "source", to be checked later.
  std::string cite(TomlCursor& table);
};

// One table each. `file` is the name of the model file.
void read_basis(TomlCursor& table, const std::string& file, ModelDraft& draft);
void read_species(TomlCursor& table, bool is_pair, const std::string& file, ModelDraft& draft);
void read_mineral(TomlCursor& table, const std::string& file, ModelDraft& draft);
void read_gas(TomlCursor& table, const std::string& file, ModelDraft& draft);
void read_constituent(TomlCursor& table, ModelDraft& draft);
void read_ambiguous_word(TomlCursor& table, ModelDraft& draft);
void read_activity_model(TomlCursor& table, ModelDraft& draft);
void read_conductivity(TomlCursor& table, ModelDraft& draft);
void read_index_roles(TomlCursor& table, ModelDraft& draft);
void read_dissolved_solids(TomlCursor& table, ModelDraft& draft);

void read_reagent(TomlCursor& table, ModelDraft& draft);
void read_resin(TomlCursor& table, ModelDraft& draft);
void read_atmosphere(TomlCursor& table, ModelDraft& draft);
void read_incompatible(TomlCursor& table, ModelDraft& draft);
void read_solid_density(TomlCursor& table, ModelDraft& draft);

// Values that several kinds of table have.
[[nodiscard]] Standing read_standing(TomlCursor& table);
[[nodiscard]] std::vector<std::string> read_texts(TomlCursor& table,
                                                  const std::string& key,
                                                  const std::string& expected);

}  // namespace ionledger
