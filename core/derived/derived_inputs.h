// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/derived/reading_values.h"
#include "core/uncertainty.h"

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <type_traits>
#include <vector>

/// What a formula of a derived quantity asks a reading for.
///
/// A formula is an ordinary function that asks for its inputs and answers with a number. It is run once for the
/// value; once more, watched, for the sheet of workings; and for the uncertainty again and again with one input
/// moved a little. So the value, its half-width and the sheet that explains it cannot differ.
namespace evenstroke {

using Number = std::optional<double>;
inline constexpr double bar_of_millibar = 1e-3;

/// One reading with everything that formulas need of it.
struct DerivedReading
{
    const Engine& engine;
    const Baseline& baseline;
    const Reading& reading;
    Conditions conditions;
    ReadingValues values;

    DerivedReading(const Engine& engine, const Baseline& baseline, const Reading& reading);
    DerivedReading(const Engine& engine, const Baseline& baseline, const Reading& reading, Conditions conditions);
    /// The baseline of a quantity at a load; nothing where it does not reach.
    Number expected(std::string_view name, double load_percent) const;
    /// The turbochargers (coolers) that anything was read of; the engine where none has a number.
    std::vector<Place> places(Place::Kind kind) const;
};

class DerivedInputs
{
public:
    explicit DerivedInputs(const DerivedReading& of) : of_(of) {}

    const DerivedReading& of() const { return of_; }
    const Engine& engine() const { return of_.engine; }

    // ------------------------------------------------------------------------- what formulas ask for
    /// The value at this place, in its quantity's own unit and kind; for a turbocharger or cooler that has none
    /// of its own, the engine's, which then stands for all.
    Number at(std::string_view name, Place place, int instrument = UncertainInput::own);
    /// The engine's own value or the mean over its places.
    Number mean(std::string_view name);
    Number at_or_mean(std::string_view name, Place place);
    /// The same where the formula can do without: what is not there is no reason for not knowing.
    Number optional_at(std::string_view name, Place place, int instrument = UncertainInput::own);
    Number optional_mean(std::string_view name);
    Number optional_at_or_mean(std::string_view name, Place place);
    /// In bar absolute; always there, 1 bar where none was read, whose uncertainty nobody knows.
    double barometer();
    /// Per cent of rated power, as typed, or from the shaft power.
    Number load();
    /// The volume that was typed as fuel consumption, l/h; nothing where a mass was typed.
    Number metered_volume();
    /// The baseline at this reading's load.
    Number baseline(std::string_view name);
    Number optional_baseline(std::string_view name);
    /// A number of the engine's description, taken as exact.
    double particular(std::string_view words, std::string_view symbol, double value, std::string_view unit);
    /// A number that somebody must choose and nobody measured, with nothing known of how good it is.
    double assumed(std::string_view words, std::string_view symbol, double value, std::string_view unit,
                   std::string_view origin);

    // --------------------------------------------------------------------------- what formulas answer
    /// The number of a result; nothing, and the reason kept, where there is a Problem.
    template <typename Measured> Number known(const Result<Measured>& result, double per_si = 1.0)
    {
        if (!result.has_value()) {
            stop(result.error());
            return std::nullopt;
        }
        if constexpr (std::is_same_v<Measured, double>)
            return result.value() * per_si;
        else
            return result.value().value() * per_si;
    }
    /// Whether there is a number; if not, the reason is kept.
    template <typename Measured> bool holds(const Result<Measured>& result)
    {
        if (!result.has_value())
            stop(result.error());
        return result.has_value();
    }
    Number not_known(std::string what_happened, std::string what_to_do);
    bool stopped() const { return problem_.has_value(); }
    /// A number on the way. @param place of which one, where there are several
    Number step(std::string_view words, Number value, std::string_view unit, Place place = {});
    void remark(std::string_view sentence);

    // ---------------------------------------------------------------------------------- how it is run
    struct Input
    {
        std::string_view name;       ///< of the quantity; of other inputs their words
        std::optional<QuantityId> quantity;
        Place place;
        enum class How { typed, mean, barometer, assumed_barometer, volume, particular, assumed, baseline } how = How::typed;
        std::size_t value_index = 0; ///< of a typed one, in Reading::values
        double value = 0.0;
        int instrument = UncertainInput::own;
        std::string_view symbol, unit, origin; ///< where no quantity says them
    };
    struct Missing
    {
        std::string_view name;
        Place place;
        bool of_baseline = false;
    };
    struct Step
    {
        std::string_view words;
        double value;
        std::string_view unit;
        Place place;
    };
    template <typename Formula> Number run(const Formula& formula)
    {
        begin();
        return formula(*this);
    }
    /// The same with the half-width, and what each input moves.
    template <typename Formula> std::optional<Propagated> run_with_uncertainty(const Formula& formula)
    {
        const Number value = run(formula);
        if (!value)
            return std::nullopt;
        const Replay replay(*this);
        return propagate(uncertain_inputs(), [&](std::span<const double> moved) {
            again(moved);
            return formula(*this);
        });
    }
    /// Keeps steps and remarks from now on.
    void watch() { watched_ = true; }

    const std::vector<Input>& inputs() const { return inputs_; }
    const std::vector<Missing>& missing() const { return missing_; }
    const std::vector<Step>& steps() const { return steps_; }
    const std::vector<std::string>& remarks() const { return remarks_; }
    const std::optional<Problem>& problem() const { return problem_; }
    /// Half-width at 95 % of one input; empty: nobody states one. Exact ones have 0.
    std::optional<double> half_width(const Input& input) const;

private:
    enum class Asked : unsigned char { at, mean, barometer, volume, special };
    struct Call
    {
        const char* name;
        Place place;
        Asked asked;
        int input; ///< -1: it was not there
    };
    class Replay
    {
    public:
        explicit Replay(DerivedInputs& inputs) : inputs_(inputs), watched_(inputs.watched_) { inputs.watched_ = false; }
        ~Replay();
        Replay(const Replay&) = delete;
        Replay& operator=(const Replay&) = delete;

    private:
        DerivedInputs& inputs_;
        bool watched_;
    };

    void begin();
    void again(std::span<const double> moved);
    void stop(const Problem& problem);
    template <typename Find> Number ask(std::string_view name, Place place, Asked asked, const Find& find);
    Number value_of(int input) const;
    int add(Input input);
    int find_at(std::string_view name, Place place, int instrument);
    int find_mean(std::string_view name);
    Number miss(Number found, std::string_view name, Place place);
    std::vector<UncertainInput> uncertain_inputs() const;

    const DerivedReading& of_;
    std::vector<Input> inputs_;
    std::vector<Call> calls_;
    std::size_t cursor_ = 0;
    std::vector<double> moved_; ///< empty: as read
    std::vector<Missing> missing_;
    std::vector<Step> steps_;
    std::vector<std::string> remarks_;
    std::optional<Problem> problem_;
    bool watched_ = false;
};

} // namespace evenstroke
