#include "app/window/card/findings_list.h"

#include <QHeaderView>
#include <QVBoxLayout>

#include <map>

#include "app/window/look/words.h"

namespace unstring {

std::vector<Finding> all_findings(const ProjectView& view, const PhaseResult* phase) {
    std::vector<Finding> all = view.findings;
    if (phase != nullptr) all.insert(all.end(), phase->failures.begin(), phase->failures.end());
    return all;
}

FindingsList::FindingsList(Desk& desk, QWidget* parent) : QWidget(parent), desk_(desk) {
    setObjectName("findings");
    auto* column = new QVBoxLayout(this);
    column->setContentsMargins(20, 14, 12, 12);
    column->setSpacing(8);
    count_ = new QLabel(this);
    count_->setFont(text_font(16, Weight::bold));
    count_->setWordWrap(true);
    filter_ = new QComboBox(this);
    filter_->setObjectName("findings_filter");
    filter_->setAccessibleName(tr("Which findings are shown"));
    filter_->addItems({tr("all findings"), tr("errors"), tr("warnings"), tr("notices")});
    list_ = new QTreeWidget(this);
    list_->setObjectName("findings_list");
    list_->setAccessibleName(tr("Findings"));
    list_->setHeaderHidden(true);
    list_->setColumnCount(1);
    list_->setWordWrap(true);
    list_->setFont(text_font(12.5));
    list_->setHorizontalScrollBarPolicy(Qt::ScrollBarAlwaysOff);
    detail_ = new QLabel(this);
    detail_->setObjectName("finding_detail");
    detail_->setWordWrap(true);
    detail_->setFont(text_font(12.5));
    detail_->setTextInteractionFlags(Qt::TextSelectableByMouse);
    set_aside_ = new QPushButton(tr("Set the records with errors aside"), this);
    set_aside_->setObjectName("set_aside");
    set_aside_->setToolTip(tr("They are in no plan until they are mended; they stay on the map, are counted, "
                              "and stand on every report."));
    connect(set_aside_, &QPushButton::clicked, this, [this] { desk_.set_errors_aside(); });
    column->addWidget(count_);
    column->addWidget(filter_);
    column->addWidget(list_, 1);
    column->addWidget(detail_);
    column->addWidget(set_aside_, 0, Qt::AlignLeft);
    connect(filter_, &QComboBox::currentIndexChanged, this, [this] { refresh(); });
    connect(list_, &QTreeWidget::currentItemChanged, this,
            [this](QTreeWidgetItem* item) { show_finding(item); });
    connect(list_, &QTreeWidget::itemActivated, this, [this](QTreeWidgetItem* item) { show_finding(item); });
    connect(&desk_, &Desk::view_changed, this, &FindingsList::refresh);
    connect(&desk_, &Desk::look_changed, this, &FindingsList::refresh);
    connect(&desk_, &Desk::closed, this, &FindingsList::refresh);
    connect(&desk_, &Desk::step_changed, this, [this] { set_aside_->setEnabled(!desk_.is_running()); });
    refresh();
}

void FindingsList::refresh() {
    const QSignalBlocker quiet(list_);
    list_->clear();
    detail_->clear();
    set_aside_->setVisible(desk_.is_open() && !desk_.view().is_read_only &&
                           desk_.view().steps[std::size_t(Step::vet)].standing == StepStanding::stopped);
    if (!desk_.is_open()) return;
    findings_ = all_findings(desk_.view(), desk_.view().phase ? &*desk_.view().phase : nullptr);
    std::map<std::pair<Severity, std::string>, std::vector<std::size_t>> groups;
    long errors = 0, warnings = 0;
    for (std::size_t i = 0; i < findings_.size(); ++i) {
        const Severity severity = findings_[i].severity;
        errors += severity == Severity::error ? 1 : 0, warnings += severity == Severity::warning ? 1 : 0;
        if (filter_->currentIndex() == 0 || int(severity) == filter_->currentIndex() - 1)
            groups[{severity, findings_[i].code}].push_back(i);
    }
    count_->setText(
        tr("%1, %2, %3")
            .arg(count_text(errors, tr("error"), tr("errors")),
                 count_text(warnings, tr("warning"), tr("warnings")),
                 count_text(long(findings_.size()) - errors - warnings, tr("notice"), tr("notices"))));
    for (const auto& [key, places] : groups) {
        auto* head = new QTreeWidgetItem(
            list_, {tr("%1 (%2): %3").arg(to_q(key.second), severity_word(key.first)).arg(places.size())});
        head->setData(0, Qt::UserRole, -1);
        head->setFont(0, text_font(12.5, Weight::bold));
        if (key.first == Severity::error) head->setForeground(0, desk_.look().trouble);
        for (const std::size_t place : places) {
            const Finding& finding = findings_[place];
            auto* item = new QTreeWidgetItem(
                head, {finding.record.empty() ? to_q(finding.found)
                                              : tr("%1: %2").arg(to_q(finding.record), to_q(finding.found))});
            item->setData(0, Qt::UserRole, int(place));
            item->setToolTip(0, finding_text(finding));
        }
        head->setExpanded(places.size() <= 12);
    }
    if (findings_.empty()) detail_->setText(tr("Nothing was found yet. Run vet to check the records."));
}

void FindingsList::show_finding(QTreeWidgetItem* item) {
    const int place = item == nullptr ? -1 : item->data(0, Qt::UserRole).toInt();
    if (place < 0 || place >= int(findings_.size())) return;
    const Finding& finding = findings_[std::size_t(place)];
    QString text = finding_text(finding);
    if (!finding.file.empty())
        text += finding.row > 0 ? tr("\n%1, row %2").arg(to_q(finding.file)).arg(finding.row)
                                : QStringLiteral("\n") + to_q(finding.file);
    detail_->setText(text);
    if (!finding.record.empty()) desk_.jump_to(finding.record);
}

} // namespace unstring
