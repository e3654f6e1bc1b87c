// The assessment as one HTML file: nothing is fetched, nothing runs, and it prints.
#include "ionledger/report.hpp"
#include "report/html_writer.hpp"
#include "report/page_sections.hpp"
#include "report/page_style.hpp"

namespace ionledger {

std::string html_report(const Assessment& assessment) {
  HtmlWriter html;
  html.trusted("<!DOCTYPE html>\n");
  {
    const Element root(html, "html", {{"lang", "en"}});
    {
      const Element head(html, "head");
      html.empty("meta", {{"charset", "utf-8"}});
      html.empty("meta", {{"name", "viewport"}, {"content", "width=device-width,initial-scale=1"}});
      html.leaf("title", {}, "ionledger: " + assessment.title);
      const Element style(html, "style");
      html.trusted(page_style);
    }
    const Element body(html, "body");
    const Element sheet(html, "main", {{"class", "sheet"}});
    write_header(html, assessment);
    if (!assessment.states.empty()) {
      const AssessedState& first = assessment.states.front();
      int number = 1;
      write_verdict(html, first);
      write_balance(html, ++number, first);
      write_minerals(html, ++number, first);
      write_species(html, ++number, first);
      write_properties(html, ++number, assessment);
      if (assessment.states.size() > 1) write_steps(html, ++number, assessment.states);
      write_cautions(html, ++number, assessment.states);
      write_equation(html, ++number, first);
      write_record(html, ++number, assessment);
    }
  }
  return std::move(html).html();
}

}  // namespace ionledger
