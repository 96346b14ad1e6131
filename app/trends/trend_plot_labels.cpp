// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/trends/trend_plot.h"

#include "app/trends/plot_items.h"

#include <QFileInfo>

#include <algorithm>
#include <cmath>
#include <memory>

namespace evenstroke {

namespace {

constexpr double label_height = 15.0; // pixels that a direct label needs

double last_finite(const std::vector<double>& values)
{
    for (auto value = values.rbegin(); value != values.rend(); ++value)
        if (std::isfinite(*value))
            return *value;
    return std::nan("");
}

} // namespace

QCPItemText* TrendPlot::add_text(const QString& text, QCPAxisRect* rect, const QColor& colour, bool bold)
{
    auto* item = new QCPItemText(this);
    item->setText(text);
    item->setFont(type(bold ? TypeSize::body : TypeSize::label, bold));
    item->setColor(colour);
    item->setClipToAxisRect(false);
    item->position->setType(QCPItemPosition::ptPlotCoords);
    item->position->setAxes(rect->axis(QCPAxis::atBottom), rect->axis(QCPAxis::atLeft));
    item->position->setAxisRect(rect);
    item->setPositionAlignment(Qt::AlignLeft | Qt::AlignVCenter);
    return item;
}

void TrendPlot::add_marks()
{
    const auto add_mark = [this](Level level, double time, double value) {
        auto* mark = new MarkItem(this, level, *theme_);
        mark->position->setAxes(values_->axis(QCPAxis::atBottom), values_->axis(QCPAxis::atLeft));
        mark->position->setCoords(time, std::clamp(value, low_, high_));
        mark->setClipToAxisRect(false);
    };
    for (const PictureFlag& flag : picture_.flags) {
        add_mark(flag.severity, flag.time, flag.value);
        if (flag.raised_time && flag.raised_value && flag.standing)
            add_mark(flag.level_now, *flag.raised_time, *flag.raised_value);
    }
    for (const PictureEvent& event : picture_.events) {
        auto* item = new EventItem(this, values_, *theme_, event.word);
        item->position->setCoords(event.time, 1.0);
        event_items_.push_back(item);
    }
}

/// Instead of a legend: axis title at the top left, the newest value and the others' name at the lines' ends.
void TrendPlot::add_labels()
{
    const QString words = picture_.band_name.isEmpty() ? picture_.axis_title
                                                       : tr("%1 · shaded: %2").arg(picture_.axis_title, picture_.band_name);
    QCPItemText* title = add_text(words, values_, theme_->muted, false);
    title->position->setType(QCPItemPosition::ptAxisRectRatio);
    title->position->setCoords(0.0, 0.0);
    title->setPositionAlignment(Qt::AlignLeft | Qt::AlignBottom);
    title->setPadding(QMargins(0, 0, 0, 4));

    const auto newest = std::find_if(picture_.points.rbegin(), picture_.points.rend(),
                                     [](const PicturePoint& p) { return !p.doubtful; });
    if (newest == picture_.points.rend())
        return;
    QCPItemText* label = add_text(newest_label(), values_, theme_->ink, true);
    label->position->setCoords(newest->time, newest->value);
    label->setPadding(QMargins(label_gap(), 0, 0, 0));

    std::vector<double> ends;
    for (const PictureLine& line : picture_.others)
        if (const double end = last_finite(line.values); std::isfinite(end))
            ends.push_back(end);
    if (ends.empty())
        return;
    std::nth_element(ends.begin(), ends.begin() + static_cast<std::ptrdiff_t>(ends.size() / 2), ends.end());
    const double height = std::max(60.0, static_cast<double>(this->height() - 200));
    const double least_apart = label_height * (high_ - low_) / height;
    double at = ends[ends.size() / 2];
    if (std::abs(at - newest->value) < least_apart)
        at = newest->value + (at >= newest->value ? least_apart : -least_apart);
    QCPItemText* others = add_text(ends.size() == 1 ? picture_.others.front().name : tr("the others"), values_,
                                   theme_->muted, false);
    others->position->setCoords(picture_.last_time, at);
    others->setPadding(QMargins(label_gap(), 0, 0, 0));
}

void TrendPlot::add_evidence()
{
    QCPAxis* x = evidence_->axis(QCPAxis::atBottom);
    QCPAxis* y = evidence_->axis(QCPAxis::atLeft);
    evidence_->setVisible(!picture_.evidence.empty());
    if (picture_.evidence.empty())
        return;
    double highest = picture_.threshold.value_or(1.0) * 1.3;
    for (const double amount : picture_.evidence)
        if (std::isfinite(amount))
            highest = std::max(highest, 1.1 * amount);
    y->setRange(0.0, highest);
    QCPGraph* graph = addGraph(x, y);
    graph->setData(QVector<double>(picture_.evidence_times.begin(), picture_.evidence_times.end()),
                   QVector<double>(picture_.evidence.begin(), picture_.evidence.end()), true);
    graph->setPen(theme_->pen(theme_->ink));
    const auto add_line_at = [&](double value, const QColor& colour, int style) {
        QCPGraph* line = addGraph(x, y);
        line->setData({x->range().lower, x->range().upper}, {value, value}, true);
        line->setPen(theme_->pen(colour, style));
        line->setLayer(QStringLiteral("background"));
    };
    add_line_at(0.0, theme_->rule, 0);
    QCPItemText* title = add_text(tr("evidence for a change of %1, all its quantities together, growing with each reading "
                                     "that supports it")
                                      .arg(picture_.evidence_of), evidence_, theme_->muted, false);
    title->position->setType(QCPItemPosition::ptAxisRectRatio);
    title->position->setCoords(0.0, 0.0);
    title->setPositionAlignment(Qt::AlignLeft | Qt::AlignBottom);
    title->setPadding(QMargins(0, 0, 0, 4));
    if (!picture_.threshold)
        return;
    add_line_at(*picture_.threshold, theme_->watch, 1);
    QCPItemText* name = add_text(picture_.threshold_words, evidence_, theme_->watch, false);
    name->position->setCoords(x->range().upper, *picture_.threshold);
    name->setTextAlignment(Qt::AlignLeft);
    name->setPadding(QMargins(8, 0, 0, 0));
}

/// A word that would run into the next flag is left to the pointer.
void TrendPlot::thin_event_words()
{
    double free_from = -1e9;
    for (EventItem* item : event_items_) {
        item->set_word_shown(true);
        const QRectF area = item->area();
        const bool fits = area.left() >= free_from && area.right() <= width() - 8.0;
        item->set_word_shown(fits);
        free_from = std::max(free_from, item->area().right());
    }
    for (std::size_t i = 0; i + 1 < event_items_.size(); ++i)
        if (event_items_[i]->area().right() > event_items_[i + 1]->area().left())
            event_items_[i]->set_word_shown(false);
}

bool TrendPlot::save(const TrendPicture& picture, const TrendExtras& extras, const QString& path, const QSize& size)
{
    TrendPlot plot;
    plot.extras_ = extras;
    plot.resize(size);
    const bool pdf = QFileInfo(path).suffix().compare(QLatin1String("pdf"), Qt::CaseInsensitive) == 0;
    plot.show_picture(picture, pdf ? theme_of(ThemeKind::print) : theme());
    return pdf ? plot.savePdf(path, size.width(), size.height())
               : plot.savePng(path, size.width(), size.height(), 2.0);
}

void TrendPlot::paint(const TrendPicture& picture, const TrendExtras& extras, QCPPainter& painter, const QSize& size)
{
    TrendPlot plot;
    plot.extras_ = extras;
    plot.resize(size);
    plot.show_picture(picture, theme_of(ThemeKind::print));
    plot.toPainter(&painter, size.width(), size.height());
}

} // namespace evenstroke
