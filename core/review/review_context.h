// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/engine/baseline.h"
#include "core/review/reading_review.h"
#include "core/sentence_words.h"
#include "core/trend/conditions.h"
#include "core/derived/derived.h"

#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// What the steps of one review share; not for other code.
namespace evenstroke::reviewing {

class ReviewContext
{
public:
    ReviewContext(const Judgement& judgement, std::size_t reading);

    const Judgement& judgement;
    const std::size_t index;
    const Engine& engine;
    const Reading& reading;
    const ReadingJudgement& judged;
    const Baseline baseline;
    const Conditions conditions;
    const std::vector<DerivedValue> derived;
    const bool generating_set;
    std::vector<const Flag*> standing; ///< at this reading, in order of their start
    /// Why the later steps judge nothing, in few words: "unsteady", "outside the baseline"; empty where they do.
    std::string held;
    std::string outside;   ///< the same for the baseline alone, also of an unsteady reading
    bool power_in_doubt = false;

    Level level_of(const Flag& flag) const; ///< as of this reading
    /// Of the quantity at this place as of this reading; an engine's drift of a cylinder quantity has the engine's place.
    Level level(QuantityId quantity, Place place) const;
    /// The trend's point of this reading, or null.
    const TrendPoint* point(QuantityId quantity, Place place) const;
    /// How far this reading is from the place's own usual level, and what the usual band says of it: "usual", "high", "low".
    struct AgainstUsual
    {
        std::optional<double> by; ///< none: nothing is known
        std::string word;
    };
    AgainstUsual against_usual(QuantityId quantity, Place place) const;
    std::vector<const JudgedValue*> values(std::string_view quantity) const;
    std::optional<double> number(std::string_view quantity) const { return engine_mean(reading, quantity, conditions); }
    /// Whether any reading of the record holds a number of this quantity.
    bool ever_read(std::string_view quantity) const;

private:
    void find_standing();
    void find_reason_to_hold();
};

/// The flag says something of this quantity: it leads, or moved so far that the trend carries a note for it.
bool speaks_of(const Flag& flag, QuantityId quantity);

inline constexpr const char* one_bar_taken = "1 bar taken: no barometer was read";

/// "high", "low": which way the line departs.
std::string direction(const ReviewLine& line);

/// Line of a typed value.
ReviewLine typed_line(const ReviewContext& context, const JudgedValue& value);
/// Line of a number worked out of the reading; also where it is not known and was known before: then the verdict says
/// what was not read. Nothing where the engine has no use for it.
std::optional<ReviewLine> derived_line(const ReviewContext& context, std::string_view name, Place place = Place::engine());
/// Lines of a typed quantity at all its places, or one that says it was not read.
void add_typed(std::vector<ReviewLine>& lines, const ReviewContext& context, std::string_view name);
void add_derived(std::vector<ReviewLine>& lines, const ReviewContext& context, std::string_view name);
/// Mean over the cylinders with its spread; nothing where no cylinder was read.
std::optional<ReviewLine> mean_line(const ReviewContext& context, std::string_view name);

/// The lines that carry a note or more: "turbocharger speed low (watch)".
std::vector<std::string> departures(const std::vector<ReviewLine>& lines);
Level worst(const std::vector<ReviewLine>& lines);

ReviewSection entry_section(const ReviewContext& context);
ReviewSection steadiness_section(const ReviewContext& context);
ReviewSection power_section(const ReviewContext& context, const PowerAgreement& power);
ReviewSection air_side_section(const ReviewContext& context);
ReviewSection means_section(const ReviewContext& context);
ReviewSection cylinders_section(const ReviewContext& context);
ReviewSection ship_section(const ReviewContext& context, const PowerAgreement& power);
ReviewSection fuel_section(const ReviewContext& context);
/// Where the state lies in the engine's load diagram; nothing without limits, power or speed.
std::optional<LoadState> load_state(const ReviewContext& context, const PowerAgreement& power);

} // namespace evenstroke::reviewing
