// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/batch/card_command.h"
#include "app/batch/command.h"
#include "app/batch/explain_command.h"
#include "app/batch/history_commands.h"
#include "app/batch/judging_commands.h"
#include "app/batch/report_command.h"

namespace evenstroke::batch {

const std::vector<Command>& all_commands()
{
    static const Option history{"history", "H", "the history file", true};
    static const Option vessel{"vessel", "V", "only this vessel"};
    static const Option engine{"engine", "E", "only this engine"};
    static const Option format{"format", "csv|json", "how rows are written; csv where nothing is said"};
    static const std::vector<Command> commands = {
        {"take", "takes folders of engines, ships and fleets into a history; made where there is none.\n      One transaction an engine "
                 "folder: a folder with a row that is not understood is refused whole and does not stop the others",
         "FOLDER...",
         {history, {"keep-good", nullptr, "take the good rows of files that hold bad ones"}},
         run_take, "a folder was refused whole, nothing of it was taken; the other folders were"},
        {"evaluate", "every value: typed, corrected, expected, deviation, apart, uncertainty",
         nullptr,
         {history, vessel, engine, {"reading", "R", "only this reading"},
          {"derived", nullptr, "computed quantities too"}, format},
         run_evaluate},
        {"flags", "a row each time a flag or a question starts", nullptr, {history, vessel, engine, format}, run_flags},
        {"doubts", "what looks mistyped", nullptr, {history, vessel, engine, format}, run_doubts},
        {"explain", "what may lie behind a reading that is out of the usual: possible causes, what fits, what speaks against",
         nullptr,
         {history, {"engine", "E", "the engine", true}, vessel, {"reading", "R", "this reading; the newest where nothing is said"},
          {"format", "text|csv|json", "how it is written; text where nothing is said"}},
         run_explain, "the engine or the reading is not there, or several are meant"},
        {"card", "evaluates indicator cards: pressures, combustion, heat, each with its uncertainty, and remarks; JSON",
         "TRACE...",
         {{"engine", "engine.json", "the engine's file", true}, {"speed-rpm", "N", "speed; the rated one where nothing is said"},
          {"scavenge-pressure-bar-abs", "P", "scavenge or charge-air pressure, absolute"},
          {"charge-temperature-k", "T", "gas temperature when the cylinder closes"}},
         run_card, "a card was refused; the others are printed"},
        {"report", "the survey report of one engine as PDF",
         nullptr,
         {history, {"engine", "E", "the engine", true}, vessel, {"from", "D", "first day, 2026-01-31", true},
          {"to", "D", "last day", true}, {"out", "FILE.pdf", "the file to write", true},
          {"date", "D", "date of the report; the last day where nothing is said"},
          {"depth", "WORD", "brief, usual or full: the values of no, the last twelve or all readings; full where nothing is said, while the window proposes usual"}},
         run_report},
        {"verify", "checks file and audit chain", nullptr, {history}, run_verify},
        {"backup", "writes a whole copy", nullptr, {history, {"to", "FILE", "the copy", true}}, run_backup},
        {"sample", "writes the invented sample vessel's files", nullptr, {{"out", "FOLDER", "where to", true}}, run_sample},
    };
    return commands;
}

} // namespace evenstroke::batch
