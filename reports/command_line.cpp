#include "reports/command_line.hpp"

#include <CLI/CLI.hpp>
#include <algorithm>

#ifndef STILLSHED_VERSION
#define STILLSHED_VERSION "0.0.0"
#endif

namespace stillshed {
namespace {

struct TaskWords {
  Task task;
  const char* name;
  const char* does;
  const char* example;
};

constexpr TaskWords kTasks[] = {
    {Task::report, "report", "the whole job: azeotropes, map, what each product can reach",
     "stillshed report acetone=42 methanol=33 water=25 --basis wt% --pressure 1atm --out report/"},
    {Task::survey, "survey", "every azeotrope with proof, stability and node type",
     "stillshed survey ethanol=50 benzene=30 water=20 --basis mol% --json -"},
    {Task::chart, "chart", "residue curves, boundaries and regions (two and three components)",
     "stillshed chart acetone=30 chloroform=30 methanol=40 --basis mol%"},
    {Task::reach, "reach", "what each product can reach, and what stops it (two and three components)",
     "stillshed reach ethanol=40 water=60 --basis wt% --product \"ethanol >= 90 wt%\" --stages 20"},
    {Task::vouch, "vouch", "source, range and evidence of every parameter in use", "stillshed vouch tank_T4.json"},
    {Task::name, "name", "what a substance name or CAS number means here",
     "stillshed name MEK 67-63-0 \"ethyl acetate\""},
    {Task::check, "check", "recomputes published check values on this installation", "stillshed check"},
};

/// CLI11's messages without its class names; our problems say where, what is allowed, what to do.
Problem problem_of(const CLI::ParseError& error) {
  return {"command line", error.what(), "", "see --help"};
}

void add_case_options(CLI::App& app, Command& command) {
  app.add_option("case", command.words,
                 "a case file (schema: reports/schema/case.schema.json), or the quick form NAME=AMOUNT ...")
      ->type_name("CASE|NAME=AMOUNT");
  app.add_option("--basis", command.form.basis, "unit of bare amounts: wt%, mol%, vol%, kg, mol, L")->type_name("UNIT");
  app.add_option("--pressure", command.form.pressure, "such as 1atm, \"150 mbar\", 2barg (default 1 atm)");
  app.add_option("--amount", command.form.amount, "of the whole stream, such as \"4200 kg\"");
  app.add_option("--model", command.form.model, "auto, unifac-dortmund, unifac, ideal (default auto)");
  app.add_option(
         "--product", command.form.products,
         "wanted product with a test, such as \"acetone >= 99.5 wt%\" or \"acetone: water <= 0.3 wt%\"; repeatable")
      ->type_name("TEXT")
      ->allow_extra_args(false);
  app.add_option("--stages", command.form.stages, "theoretical stages, the pot included")->type_name("N");
  app.add_option("--title", command.form.title, "printed on top");
  app.add_option(
         "--declare", command.declared,
         "history, region or use that brings up cautions: azides, hydrogen-peroxide, strong-base, ...; repeatable")
      ->type_name("WORD")
      ->allow_extra_args(false);
  app.add_option("--seed", command.seed, "of every random choice (default 1)")->type_name("N");
}

void add_output_options(CLI::App& app, Command& command) {
  app.add_option("--json", command.json,
                 "writes the result for machines; - for standard output, then nothing else goes there")
      ->type_name("FILE|-");
  app.add_flag("--quiet", command.quiet, "prints nothing for people");
}

std::string overview() {
  std::string text =
      "stillshed: which products can distillation bring out of this mixture, and what stops the others?\n\n"
      "usage: stillshed TASK CASE|NAME=AMOUNT ... [options]\n\ntasks\n";
  for (const TaskWords& task : kTasks) {
    text += "  " + std::string(task.name) + std::string(10 - std::string(task.name).size(), ' ') + task.does + "\n";
  }
  text += "\nexample\n  " + std::string(kTasks[0].example) +
          "\n\n\"stillshed TASK --help\" shows the options and an example of each.\n";
  return text;
}

const TaskWords& find_task(const std::string& word) {
  std::vector<std::string> names;
  for (const TaskWords& task : kTasks) {
    if (word == task.name) {
      return task;
    }
    names.emplace_back(task.name);
  }
  std::string allowed;
  for (const std::string& name : names) {
    allowed += (allowed.empty() ? "" : ", ") + name;
  }
  const std::string near = nearest_word(word, names);
  throw InputError(Problem{"command line", in_quotes(word), "a task: " + allowed,
                           near.empty() ? "see stillshed --help" : "did you mean " + in_quotes(near) + "?"});
}

/// A quick form or one file, not both.
void sort_words(Command& command) {
  if (command.task == Task::name || command.task == Task::check) {
    return;
  }
  std::vector<std::string> files;
  for (const std::string& word : command.words) {
    (is_stream_word(word) ? command.form.stream : files).push_back(word);
  }
  if (command.form.stream.empty() && files.size() == 1) {
    command.words = files;
    return;
  }
  if (command.form.stream.empty() || !files.empty()) {
    std::string found = files.empty() ? "no stream" : "";
    for (const std::string& file : files) {
      found += (found.empty() ? "" : ", ") + in_quotes(file);
    }
    throw InputError(Problem{"command line", found, "one case file, or NAME=AMOUNT for every component",
                             "example: stillshed report acetone=42 methanol=33 water=25 --basis wt%"});
  }
  command.words.clear();
}

}  // namespace

const char* to_string(Task task) {
  for (const TaskWords& words : kTasks) {
    if (words.task == task) {
      return words.name;
    }
  }
  return "";
}

Command read_command_line(const std::vector<std::string>& words) {
  Command command;
  if (words.empty() || words.front() == "--help" || words.front() == "-h" || words.front() == "help") {
    command.message = overview();
    return command;
  }
  if (words.front() == "--version") {
    command.message = "stillshed " STILLSHED_VERSION "\n";
    return command;
  }
  const TaskWords& task = find_task(words.front());
  command.task = task.task;
  CLI::App app(task.does, "stillshed " + std::string(task.name));
  app.footer("\nexample\n  " + std::string(task.example));
  if (task.task == Task::name) {
    app.add_option("name", command.words, "names or CAS numbers")->type_name("NAME ...")->required();
    add_output_options(app, command);
  } else if (task.task == Task::check) {
    add_output_options(app, command);
  } else {
    add_case_options(app, command);
    if (task.task == Task::report) {
      app.add_option("--out", command.out, "folder for report.html and result.json")->type_name("DIR");
    }
    add_output_options(app, command);
  }
  std::vector<std::string> reversed(words.rbegin(), words.rend() - 1);
  try {
    app.parse(reversed);
  } catch (const CLI::CallForHelp&) {
    command.message = app.help();
    return command;
  } catch (const CLI::ParseError& error) {
    throw InputError(problem_of(error));
  }
  sort_words(command);
  return command;
}

}  // namespace stillshed
