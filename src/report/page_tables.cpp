// The sections of evidence: species, properties and indices, and the record.
#include "report/essentials.hpp"
#include "report/number_text.hpp"
#include "report/page_sections.hpp"
#include "report/text_page.hpp"
#include "report/text_sections.hpp"

namespace ionledger {
namespace {

void write_gases(HtmlWriter& html, const AssessedState& state) {
  std::vector<std::vector<std::string>> rows;
  for (const GasLine& gas : gases_shown(state, false)) {
    rows.push_back(
        {gas.gas, typeset_formula(gas.formula), scientific_text(gas.partial_pressure_bar)});
  }
  if (rows.empty()) return;
  html.leaf("h3", {}, "Gases in balance with the water");
  write_table(html, "", {{"Gas", "", true}, {"Formula", "", true}, {"Pressure", "bar"}}, rows);
}

/// A value of an index and the unit that goes with it.
std::string index_text(const IndexLine& line) {
  return line.unit.empty() ? fixed_text(*line.value, 2)
                           : significant_text(*line.value) + " " + typeset_words(line.unit);
}

void write_indices(HtmlWriter& html, const AssessedState& state) {
  std::vector<std::vector<std::string>> rows;
  std::string missing;
  for (const IndexLine& line : state.indices) {
    if (line.value) {
      rows.push_back({line.title, index_text(line)});
    } else {
      missing += (missing.empty() ? "" : "; ") + line.title + ": " + line.missing;
    }
  }
  if (rows.empty()) return;
  html.leaf("h3", {}, "Indices by their published formulas");
  write_table(html, "", {{"Index", "", true}, {"Value", "with unit, if it has one"}}, rows);
  if (!missing.empty())
    html.leaf("p", {{"class", "note"}}, "Left out for want of a value: " + missing + ".");
}

void write_laboratory(HtmlWriter& html, const AssessedState& state) {
  if (state.totals.empty()) return;
  std::vector<std::vector<std::string>> rows;
  for (const TotalLine& total : state.totals) {
    rows.push_back({shown_words(total.constituent),
                    total.as_written.empty() ? "derived" : total.as_written,
                    significant_text(total.mol_per_kg * 1e3, 4),
                    significant_text(total.mg_per_l, 4),
                    typeset_formula(total.as_formula)});
  }
  html.leaf("h3", {}, "What the laboratory wrote");
  write_table(
      html,
      "Derived: follows from the other values, the pH or the charge balance. Alkalinity and "
      "hardness in meq/kg.",
      {{"Constituent", "", true},
       {"As written", "", true},
       {"Per kg of water", "mmol/kg"},
       {"Per litre", "mg/L"},
       {"Counted as", "", true}},
      rows);
}

void write_index_sources(HtmlWriter& html, const AssessedState& state) {
  if (state.indices.empty()) return;
  html.leaf("h3", {}, "Formulas of the indices");
  const Element list(html, "ul");
  for (const IndexLine& line : state.indices) {
    if (line.value)
      html.leaf("li", {}, line.title + ": " + line.formula + ". " + line.source + ".");
  }
}

void write_certificates(HtmlWriter& html, const std::vector<AssessedState>& states) {
  std::vector<std::vector<std::string>> rows;
  for (const AssessedState& state : states) {
    const Certificate& certificate = state.certificate;
    rows.push_back({shown_words(state.name),
                    certificate.converged ? "converged" : "not converged",
                    scientific_text(certificate.worst_balance_residual, 1),
                    typeset_formula(certificate.worst_balance),
                    scientific_text(certificate.charge_residual, 1),
                    scientific_text(certificate.ionic_strength_residual, 1),
                    std::to_string(certificate.iterations),
                    certificate.path});
  }
  html.leaf("h3", {}, "Certificate of the solution");
  write_table(html,
              "Residuals are relative, and were checked after solving by code that did not solve.",
              {{"State", "", true},
               {"Result", "", true},
               {"Worst balance", "no unit"},
               {"of", "", true},
               {"Charge", "no unit"},
               {"Ionic strength", "no unit"},
               {"Iterations", ""},
               {"Path", "", true}},
              rows);
}

}  // namespace

void write_table(HtmlWriter& html,
                 const std::string& caption,
                 const std::vector<PageColumn>& columns,
                 const std::vector<std::vector<std::string>>& rows) {
  const Element scroll(html, "div", {{"class", "scroll"}});
  const Element table(html, "table");
  if (!caption.empty()) html.leaf("caption", {}, caption);
  {
    const Element head(html, "thead");
    const Element row(html, "tr");
    for (const PageColumn& column : columns) {
      const Element cell(
          html, "th", {{"scope", "col"}, {"class", column.is_text ? "left" : "num"}});
      html.text(column.name);
      if (!column.unit.empty()) html.leaf("span", {{"class", "u"}}, column.unit);
    }
  }
  const Element body(html, "tbody");
  for (const std::vector<std::string>& cells : rows) {
    const Element row(html, "tr");
    for (std::size_t i = 0; i < cells.size(); ++i) {
      Attributes attributes = {{"class", columns[i].is_text ? "left" : "num"}};
      if (i == 0) attributes.push_back({"scope", "row"});
      html.leaf(i == 0 ? "th" : "td", attributes, cells[i]);
    }
  }
}

void write_species(HtmlWriter& html, int number, const AssessedState& state) {
  const std::vector<SpeciesLine> shown = species_shown(state, false);
  const Section section(html,
                        number,
                        "species-section",
                        "Species that matter",
                        std::to_string(shown.size()) + " of " +
                            counted(state.species.size(), "species", "species") +
                            "; each of the others is below a thousandth of the most abundant.");
  std::vector<std::vector<std::string>> rows;
  for (const SpeciesLine& line : shown) {
    rows.push_back({typeset_formula(line.species),
                    line.charge == 0 ? "0" : signed_text(line.charge, 0),
                    scientific_text(line.molality),
                    fixed_text(line.activity_coefficient, 3),
                    scientific_text(line.activity)});
  }
  write_table(html,
              "",
              {{"Species", "", true},
               {"Charge", "no unit"},
               {"Molality", "mol/kg of water"},
               {"Activity coefficient γ", "no unit"},
               {"Activity", "no unit"}},
              rows);
  write_gases(html, state);
}

void write_properties(HtmlWriter& html, int number, const Assessment& assessment) {
  const AssessedState& state = assessment.states.front();
  const bool is_trusted = state.ionic_strength <= assessment.max_ionic_strength;
  const Section section(html,
                        number,
                        "properties-section",
                        "pH, ionic strength, conductivity and indices",
                        "The ionic strength is " + std::string(is_trusted ? "within" : "beyond") +
                            " the " + significant_text(assessment.max_ionic_strength, 2) +
                            " mol/kg to which the activity model is trusted by its authors.");
  std::vector<std::vector<std::string>> rows;
  for (const Essential& essential : essentials_of(state)) {
    rows.push_back({essential.name, typeset_words(essential.value)});
  }
  write_table(html, "", {{"Property", "", true}, {"Value", "with unit", true}}, rows);
  write_indices(html, state);
}

void write_record(HtmlWriter& html, int number, const Assessment& assessment) {
  const Section section(html, number, "record", "Record", "");
  write_laboratory(html, assessment.states.front());
  html.leaf("h3", {}, "Method");
  html.leaf("p",
            {},
            "Mass balances, mass action and the balance of charge are solved together at the "
            "temperature of each state, with activity coefficients that belong to the ionic "
            "strength found. Activity coefficients: " +
                assessment.activity_model + ", " + assessment.activity_title + ".");
  html.leaf("p",
            {{"class", "digest"}},
            "Chemistry " + assessment.chemistry + ", digest of its files " + assessment.digest);
  if (!assessment.sources.empty()) {
    html.leaf("h3", {}, "Sources of the constants");
    const Element list(html, "ul");
    for (const std::string& source : assessment.sources) html.leaf("li", {}, source);
  }
  write_index_sources(html, assessment.states.front());
  write_certificates(html, assessment.states);
}

}  // namespace ionledger
