// The sections that are read first: header, verdict, ion balance, minerals, and the equation of the
// charge balance.
#include "report/page_sections.hpp"

#include "report/account.hpp"
#include "report/number_text.hpp"
#include "report/plot.hpp"
#include "report/text_page.hpp"
#include "report/text_sections.hpp"
#include "report/verdict.hpp"

namespace ionledger {
namespace {

std::string capitalised(std::string text) {
  if (!text.empty() && text[0] >= 'a' && text[0] <= 'z') text[0] = char(text[0] - 'a' + 'A');
  return text;
}

void write_fact(HtmlWriter& html,
                const std::string& name,
                const std::string& value,
                const std::string& unit) {
  const Element fact(html, "div");
  html.leaf("dt", {}, name);
  const Element text(html, "dd");
  html.text(value + (unit.empty() ? "" : "\u202F"));
  if (!unit.empty()) html.leaf("small", {}, unit);
}

void write_facts(HtmlWriter& html, const AssessedState& state) {
  const Element facts(html, "dl", {{"class", "facts"}});
  write_fact(html, "Temperature", plain_text(state.temperature_degc), "°C");
  write_fact(html,
             state.ph_from == "measured" ? "pH, measured" : "pH, from " + state.ph_from,
             fixed_text(state.ph, 2),
             "");
  write_fact(html, "Ionic strength", significant_text(state.ionic_strength), "mol/kg");
  write_fact(html, "Alkalinity", significant_text(state.alkalinity_eq_per_kg * 1e3), "meq/kg");
  write_fact(html, "Dissolved solids", significant_text(state.tds_mg_per_l, 4), "mg/L");
}

void write_verdict_line(HtmlWriter& html, const std::string& question, const Verdict& verdict) {
  const Element line(html, "div");
  html.leaf("dt", {}, question);
  const std::string style = verdict.ink == Ink::alarm   ? "alarm"
                            : verdict.ink == Ink::watch ? "watch"
                                                        : "plain";
  const Element answer(html, "dd");
  html.leaf("span", {{"class", style}}, capitalised(verdict.text) + ".");
}

std::string balance_finding(const AssessedState& state) {
  std::string text = "The analysis " + verdict_on_analysis(state).text + ".";
  if (balance_was_spent_on_ph(state)) {
    return "The pH was taken from this balance, so it cannot test the analysis.";
  }
  if (!state.closed_by.empty()) {
    text += " Drawn after " + shown_words(state.closed_by) + " was changed by " +
            signed_text(state.closing_change_mol_per_kg * 1e3, 3) +
            " mmol/kg; as reported the gap was " +
            signed_text(state.reported_imbalance_eq_per_kg * 1e3, 3) + " meq/kg.";
  }
  return text;
}

struct Term {
  std::string style, what, amount;
};

void write_term(HtmlWriter& html, const std::string& sign, const Term& term) {
  const Element outer(html, "span", {{"class", "term " + term.style}});
  html.leaf("span", {{"class", "op"}}, sign);
  const Element pair(html, "span", {{"class", "pair"}});
  html.leaf("span", {{"class", "what"}}, term.what);
  html.leaf("span", {{"class", "amount"}}, term.amount);
}

Term term_of(const AccountSide::Entry& entry, const AccountUnit& unit) {
  if (entry.charges == 0) return {"", entry.name, unit.text(entry.steps)};
  const std::string factor = std::to_string(entry.charges);
  return {"",
          (entry.charges > 1 ? factor + "\u202F" : "") + "[" + typeset_formula(entry.name) + "]",
          (entry.charges > 1 ? factor + " × " : "") + entry.molality};
}

}  // namespace

Section::Section(HtmlWriter& html,
                 int number,
                 const std::string& style,
                 const std::string& heading,
                 const std::string& finding)
    : element_(html,
               "section",
               {{"class", style}, {"aria-labelledby", "section-" + std::to_string(number)}}) {
  {
    const Element title(html, "h2", {{"id", "section-" + std::to_string(number)}});
    html.leaf("span", {{"class", "no"}}, std::to_string(number));
    html.text(heading);
  }
  if (!finding.empty()) html.leaf("p", {{"class", "find"}}, finding);
}

std::string shown_words(std::string_view key) {
  std::string text(key);
  for (char& c : text) c = c == '_' ? ' ' : c;
  return text;
}

void write_header(HtmlWriter& html, const Assessment& assessment) {
  const Element header(html, "header");
  {
    const Element brand(html, "p", {{"class", "brand"}});
    {
      const Element mark(
          html,
          "svg",
          {{"width", "26"}, {"height", "18"}, {"viewBox", "0 0 26 18"}, {"aria-hidden", "true"}});
      const auto bar = [&](const char* y, const char* width, const char* colour) {
        html.empty("rect",
                   {{"x", "0"}, {"y", y}, {"width", width}, {"height", "5"}, {"fill", colour}});
      };
      bar("2", "24", "#0A7872");
      bar("11", "26", "#96408F");
    }
    const Element words(html, "span");
    html.leaf("b", {}, "ionledger");
    html.text(" stream assessment");
  }
  html.leaf("h1", {}, assessment.title.empty() ? "Untitled stream" : assessment.title);
  if (assessment.states.empty()) return;
  const AssessedState& state = assessment.states.front();
  const std::size_t further = assessment.states.size() - 1;
  html.leaf("p",
            {{"class", "sub"}},
            capitalised(shown_words(state.name)) + ", " + plain_text(state.temperature_degc) +
                " °C, " + plain_text(state.pressure_bar) + " bar" +
                (further > 0 ? "; " + counted(further, "state", "states") + " after it" : ""));
  write_facts(html, state);
}

void write_verdict(HtmlWriter& html, const AssessedState& state) {
  const Section section(html, 1, "verdict-section", "Verdict", "");
  const Element lines(html, "dl", {{"class", "verdict"}});
  const Verdict analysis = verdict_on_analysis(state);
  const Verdict scale = verdict_on_scale(state);
  // A failed balance is the first thing to know: it makes every index below unsure.
  if (analysis.ink == Ink::alarm) {
    write_verdict_line(html, "Not sure", {"the analysis " + analysis.text, Ink::alarm});
    write_verdict_line(html, "As reported", {scale.text, Ink::plain});
  } else {
    write_verdict_line(html, "What scales", scale);
    write_verdict_line(html, "How sure", {"the analysis " + analysis.text, analysis.ink});
  }
  write_verdict_line(html, "Take care", verdict_on_care(state));
}

void write_balance(HtmlWriter& html, int number, const AssessedState& state) {
  const Section section(html, number, "balance-section", "Ion balance", balance_finding(state));
  plot_balance(html, state);
}

void write_minerals(HtmlWriter& html, int number, const AssessedState& state) {
  std::vector<MineralLine> shown = minerals_shown(state, true, false);
  std::size_t forming = 0, near = 0;
  for (const MineralLine& mineral : shown) {
    forming += saturation_of(mineral) == Saturation::would_form ? 1 : 0;
    near += saturation_of(mineral) == Saturation::near ? 1 : 0;
  }
  const Section section(
      html,
      number,
      "minerals-section",
      "What scales",
      state.minerals.empty()
          ? "No mineral can form from what was reported."
          : counted(forming, "common scale", "common scales") + " would form, " +
                std::to_string(near) +
                " near saturation. The bar starts at saturation; the whisker is the 95 % interval "
                "from the constant of the mineral alone, without the errors of the analysis.");
  if (!shown.empty()) plot_minerals(html, shown, "common-scales");
  const std::vector<MineralLine> rare = minerals_shown(state, false, false);
  if (!rare.empty()) {
    html.leaf("h3", {}, "Past saturation, but rarely formed in a plant");
    plot_minerals(html, rare, "rare-minerals");
  }
  shown.insert(shown.end(), rare.begin(), rare.end());
  const Element remarks(html, "dl", {{"class", "remarks"}});
  for (const MineralLine& mineral : shown) {
    if (mineral.remark.empty() || !(mineral.saturation_index > 0)) continue;
    const Element group(html, "div");
    html.leaf("dt", {}, capitalised(mineral.mineral) + ", " + typeset_formula(mineral.formula));
    html.leaf("dd", {}, mineral.remark);
  }
}

void write_equation(HtmlWriter& html, int number, const AssessedState& state) {
  const Account account = account_of(state, false);
  const std::string unit = account.unit.prefix;
  const Section section(html,
                        number,
                        "equation-section",
                        "The charge balance of this stream",
                        "Brackets are molalities in " + unit + "mol/kg of water at " +
                            plain_text(state.temperature_degc) +
                            " °C, the numbers below them; sums and " + "traces are in " + unit +
                            "eq/kg, rounded so that they add up.");
  const Element equation(html, "div", {{"class", account.closes ? "equation closes" : "equation"}});
  const auto write_side = [&](const AccountSide& side, const std::string& first, bool has_gap) {
    const Element line(html, "div", {{"class", "side"}});
    std::string sign = first;
    for (const AccountSide::Entry& entry : side.entries) {
      write_term(html, sign, term_of(entry, account.unit));
      sign = "+";
    }
    if (has_gap) write_term(html, "+", {"gapterm", "gap", account.gap_text()});
    const long long sum = side.sum + (has_gap ? account.gap : 0);
    html.leaf("span", {{"class", "sum"}}, account.unit.text(sum) + " " + unit + "eq/kg");
  };
  write_side(account.cations, "", false);
  write_side(account.anions, "=", true);
}

}  // namespace ionledger
